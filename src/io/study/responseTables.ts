import { join } from 'node:path'
import type { ResponseRow, ResponseSummary } from '../../model/experiments/comparison.ts'
import { textTable } from '../textTable.ts'
import { numberField, textField } from './unitOfName.ts'
import { type Row, writeRows } from './writeRows.ts'

/** The response to one change. */
export interface Response {
  /** The change as the user wrote it, or what is compared. */
  change: string
  rows: ResponseRow[]
  summary: ResponseSummary[]
}

const inItsUnit = 'in the unit that the name of the quantity ends in'

const FIELDS = [
  textField('change', 'the change as it was asked for'),
  numberField('time_h', 'time since the start of the run'),
  textField('quantity', 'what responds, with its unit'),
  textField('channel', 'name of the channel; null for what has none', true),
  { ...numberField('control', `value without the change, ${inItsUnit}`), unit: '' },
  { ...numberField('changed', `value with the change, ${inItsUnit}`), unit: '' },
  { ...numberField('difference', `changed less control, ${inItsUnit}`), unit: '' },
  numberField('relative', 'difference over control; null where the control is below its own floor'),
  {
    ...numberField('floor', `numerical floor of the difference, from tighter runs, ${inItsUnit}`),
    unit: '',
  },
]

/** Writes response.arrow: all responses one below the other. */
export function writeResponses(directory: string, responses: readonly Response[]): void {
  const metadata: [string, string][] = [
    ['format', 'mesofrost-response'],
    ['format_version', '1'],
  ]
  const rows = function* (): Generator<Row> {
    for (const { change, rows } of responses) for (const row of rows) yield { change, ...row }
  }
  writeRows(join(directory, 'response.arrow'), { fields: FIELDS, metadata }, rows())
}

function numbersOf(summary: readonly ResponseSummary[], name: keyof ResponseSummary): number[] {
  return summary.map((row) => (row[name] as number | null) ?? Number.NaN)
}

function isReal({ above_floor }: ResponseSummary): string {
  if (above_floor === null) return 'not measured'
  return above_floor ? 'yes' : 'no'
}

/** The summary as a table for the screen. */
export function summaryText(summary: readonly ResponseSummary[]): string {
  return textTable([
    { name: 'quantity', values: summary.map(({ quantity }) => quantity) },
    { name: 'channel', values: summary.map(({ channel }) => channel ?? '-') },
    { name: 'largest', values: numbersOf(summary, 'largest') },
    { name: 'relative', values: numbersOf(summary, 'largest_relative') },
    { name: 'at_h', values: numbersOf(summary, 'largest_at_h') },
    { name: 'integrated_h', values: numbersOf(summary, 'integrated') },
    { name: 'delay_h', values: numbersOf(summary, 'delay_h') },
    { name: 'duration_h', values: numbersOf(summary, 'duration_h') },
    { name: 'floor', values: numbersOf(summary, 'floor') },
    { name: 'above floor', values: summary.map(isReal) },
  ])
}
