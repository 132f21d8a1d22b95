import type { BackgroundTable } from '../model/diagnostics/backgroundTable.ts'
import type { Diagnosis } from '../model/diagnostics/diagnose.ts'
import type { Variable } from '../model/diagnostics/variables.ts'
import type { Scenario } from '../model/scenario/types.ts'
import type { SimulationEvent, Snapshot, SolverStatistics } from '../model/simulate.ts'
import type { Column } from '../model/state/column.ts'

/** Collects the summary of a run while it passes by. */
export interface RunningSummary {
  add(diagnosis: Diagnosis): void
  /** Named numbers, and warnings that only the whole run can give. */
  result(): { numbers: Record<string, number | null>; warnings: string[] }
}

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
