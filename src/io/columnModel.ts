import { type BackgroundTable, backgroundTable } from '../model/diagnostics/backgroundTable.ts'
import { brightnessVariables } from '../model/diagnostics/brightness.ts'
import { budgetVariables } from '../model/diagnostics/budget.ts'
import { type Diagnosis, diagnose, sizeVariables } from '../model/diagnostics/diagnose.ts'
import { profileVariables } from '../model/diagnostics/profileVariables.ts'
import { type RunningSummary, summarise } from '../model/diagnostics/summary.ts'
import type { Variable } from '../model/diagnostics/variables.ts'
import type { Scenario } from '../model/scenario/types.ts'
import {
  type SimulationEvent,
  type Snapshot,
  type SolverStatistics,
  simulate,
} from '../model/simulate.ts'
import { type Column, prepareColumn, stateLayoutDescription } from '../model/state/column.ts'

export type { RunningSummary } from '../model/diagnostics/summary.ts'

/** What a run needs of the model. Named here so that a test can put a small stand-in in its place. */
export interface ColumnModel {
  prepareColumn(scenario: Scenario): Column
  simulate(column: Column, from?: Snapshot): Generator<SimulationEvent, SolverStatistics>
  diagnose(column: Column, snapshot: Snapshot): Diagnosis
  summarise(column: Column): RunningSummary
  profileVariables(scenario: Scenario): Variable[]
  sizeVariables(scenario: Scenario): Variable[]
  brightnessVariables(scenario: Scenario): Variable[]
  budgetVariables(scenario: Scenario): Variable[]
  stateLayoutDescription(column: Column): unknown
  backgroundTable(column: Column, time_s: number): BackgroundTable
}

export const columnModel: ColumnModel = {
  prepareColumn,
  simulate,
  diagnose,
  summarise,
  profileVariables,
  sizeVariables,
  brightnessVariables,
  budgetVariables,
  stateLayoutDescription,
  backgroundTable,
}
