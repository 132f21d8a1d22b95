import { join } from 'node:path'
import type { Diagnosis } from '../model/diagnostics/diagnose.ts'
import type { Variable } from '../model/diagnostics/variables.ts'
import type { Scenario } from '../model/scenario/types.ts'
import type { Snapshot } from '../model/simulate.ts'
import type { Column } from '../model/state/column.ts'
import { listField, scalarFields, type TableMetadata } from './arrow/tableField.ts'
import { TableWriter } from './arrow/tableWriter.ts'
import type { ColumnModel } from './columnModel.ts'
import { STATE_FILE, stateShape } from './savedStates.ts'

export interface TableRequest {
  model: ColumnModel
  column: Column
  scenario: Scenario
  identity: string
  /** Whether size-distribution.arrow is wanted. */
  writeSizes: boolean
}

/** The Arrow files of one run, written as it goes. */
export interface RunTables {
  add(diagnosis: Diagnosis): void
  addState(snapshot: Snapshot): void
  /** Completes all files. */
  close(): void
  /** Leaves all files as they are: for when writing has failed. */
  abandon(): void
}

/** About a megabyte per batch, whatever the grid. */
const PROFILE_ROWS = 4096
const SIZE_ROWS = 1024
const SERIES_ROWS = 1024

function metadata(kind: string, request: TableRequest): TableMetadata {
  const { scenario, identity } = request
  const common: TableMetadata = [
    ['format', `mesofrost-${kind}`],
    ['format_version', '1'],
    ['title', scenario.title],
    ['run_identity', identity],
  ]
  return scenario.startUtc === null ? common : [...common, ['start_utc', scenario.startUtc]]
}

/** Radii of the size classes as a JSON list of numbers in nm, to twelve digits. */
function classRadii(column: Column): [string, string] {
  const radii = Array.from(column.sizes.radii_m, (radius) => Number((radius * 1e9).toPrecision(12)))
  return ['class_radii_nm', JSON.stringify(radii)]
}

function openScalars(path: string, variables: Variable[], rows: number, about: TableMetadata) {
  const fields = scalarFields(variables)
  return new TableWriter(path, { fields, metadata: about, rowsPerBatch: rows })
}

function openSizes(directory: string, request: TableRequest): TableWriter {
  const { column, model, scenario } = request
  const [time, altitude, number] = model.sizeVariables(scenario)
  return new TableWriter(join(directory, 'size-distribution.arrow'), {
    fields: [...scalarFields([time, altitude]), listField(number, column.sizes.radii_m.length)],
    metadata: [...metadata('size-distribution', request), classRadii(column)],
    rowsPerBatch: SIZE_ROWS,
  })
}

export function openRunTables(directory: string, request: TableRequest): RunTables {
  const { model, scenario, column } = request
  const at = (kind: string) => join(directory, `${kind}.arrow`)
  const scalars = (kind: string, variables: Variable[], rows: number) =>
    openScalars(at(kind), variables, rows, metadata(kind, request))
  const profiles = scalars('profiles', model.profileVariables(scenario), PROFILE_ROWS)
  const brightness = scalars('brightness', model.brightnessVariables(scenario), SERIES_ROWS)
  const budget = scalars('budget', model.budgetVariables(scenario), SERIES_ROWS)
  const sizes = request.writeSizes ? openSizes(directory, request) : null
  const layout = JSON.stringify(model.stateLayoutDescription(column))
  const states = new TableWriter(
    join(directory, STATE_FILE),
    stateShape([...metadata('state', request), ['layout', layout]], column.layout.length),
  )
  const all = [profiles, brightness, budget, states, ...(sizes === null ? [] : [sizes])]
  return {
    add(diagnosis) {
      const levels = diagnosis.profiles.altitude_km.length
      profiles.append(diagnosis.profiles, levels)
      brightness.append(diagnosis.brightness, diagnosis.brightness.channel.length)
      const row = Object.entries(diagnosis.budget).map(([name, value]) => [name, [value]])
      budget.append(Object.fromEntries(row), 1)
      const number_per_class_per_m3 = diagnosis.numberPerClass
      sizes?.append({ ...diagnosis.profiles, number_per_class_per_m3 }, levels)
    },
    addState(snapshot) {
      states.append(
        {
          time_s: [snapshot.time_s],
          step_size_s: [snapshot.stepSize_s],
          basis_time_s: [snapshot.basisTime_s],
          state: snapshot.y,
        },
        1,
      )
    },
    close() {
      for (const table of all) table.close()
    },
    abandon() {
      for (const table of all) table.abandon()
    },
  }
}
