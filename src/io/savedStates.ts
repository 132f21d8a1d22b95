import { join } from 'node:path'
import { InputError } from '../model/errors.ts'
import type { Snapshot } from '../model/simulate.ts'
import { listField, scalarFields, type TableMetadata } from './arrow/tableField.ts'
import { readTable } from './arrow/tableReader.ts'
import type { TableShape } from './arrow/tableWriter.ts'
import { formatTime } from './timeText.ts'

export const STATE_FILE = 'state.arrow'

const STATES_PER_BATCH = 16
/** Saved times are output times, which differ by more; a time typed in hours is rounded. */
const SAME_TIME_S = 0.5

function seconds(name: string, longName: string) {
  return { name, longName, unit: 's', standardName: null, type: 'number' as const }
}

export function stateShape(metadata: TableMetadata, stateLength: number): TableShape {
  const state = {
    name: 'state',
    longName: 'state of the column, laid out as the metadata tell',
    unit: '',
    standardName: null,
    type: 'number' as const,
  }
  return {
    fields: [
      ...scalarFields([
        seconds('time_s', 'time since the start of the run'),
        seconds('step_size_s', 'step size that the integration goes on with'),
        seconds('basis_time_s', 'time whose background the air density was balanced for'),
      ]),
      listField(state, stateLength),
    ],
    metadata,
    rowsPerBatch: STATES_PER_BATCH,
  }
}

export interface SavedState {
  snapshot: Snapshot
  /** Canonical description of the layout of the state, to compare with a column's own. */
  layout: string
}

/**
 * Reads a state that a run saved.
 *
 * @param time_s which one; 'first' or 'last' of them
 */
export async function readSavedState(
  directory: string,
  time_s: number | 'first' | 'last',
): Promise<SavedState> {
  const { rows, columns, metadata } = await readTable(join(directory, STATE_FILE))
  const times = columns.time_s as Float64Array
  const row = rowAt(times, rows, time_s)
  if (row === -1)
    throw new InputError(
      `${directory} has no state saved at ${formatTime(time_s as number)}; it has ${Array.from(times, formatTime).join(', ') || 'none'}`,
    )
  const state = columns.state as Float64Array
  const length = state.length / rows
  const snapshot: Snapshot = {
    time_s: times[row],
    y: state.slice(row * length, (row + 1) * length),
    stepSize_s: (columns.step_size_s as Float64Array)[row],
    basisTime_s: (columns.basis_time_s as Float64Array)[row],
  }
  return { snapshot, layout: metadata.get('layout') ?? '' }
}

function rowAt(times: Float64Array, rows: number, time_s: number | 'first' | 'last'): number {
  if (time_s === 'first') return rows > 0 ? 0 : -1
  if (time_s === 'last') return rows - 1
  return times.findIndex((time) => Math.abs(time - time_s) < SAME_TIME_S)
}
