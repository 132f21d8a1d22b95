import { InputError } from '../model/errors.ts'
import { nearestWord } from '../model/scenario/nearestWord.ts'
import type { TableField } from './arrow/tableField.ts'
import type { TableRows } from './arrow/tableReader.ts'
import type { ShownColumn } from './textTable.ts'
import { formatTime } from './timeText.ts'

const SAME_TIME_H = 1e-6
const KEYS = ['time_h', 'time_s', 'altitude_km', 'channel']

/** Longer lists, such as the whole state, are only shown when named. */
const LONGEST_UNASKED_LIST = 200

/** The fields that the user named, after those that tell the rows apart; all ordinary ones without names. */
export function chosenFields(fields: TableField[], names: string[] | null): TableField[] {
  if (names === null)
    return fields.filter(({ listLength }) => (listLength ?? 0) <= LONGEST_UNASKED_LIST)
  const known = fields.map(({ name }) => name)
  for (const name of names) {
    if (known.includes(name)) continue
    const nearest = nearestWord(name, known)
    throw new InputError(
      `there is no variable '${name}' in this file${nearest === null ? '' : `; did you mean ${nearest}?`} It has ${known.join(', ')}`,
    )
  }
  return fields.filter(({ name }) => names.includes(name) || KEYS.includes(name))
}

/** Time of every row, h; null for a table without time. */
export function rowTimes_h({ columns }: TableRows): Float64Array | null {
  if (columns.time_h !== undefined) return columns.time_h as Float64Array
  if (columns.time_s === undefined) return null
  return (columns.time_s as Float64Array).map((time_s) => time_s / 3600)
}

/** Of all times of a table, the one nearest to the wanted one; refuses a time outside them. */
export function nearestTime(times_h: Iterable<number>, wanted_h: number): number {
  const times = [...new Set(times_h)]
  if (times.length === 0) throw new InputError('the table has no times to choose from')
  const last = Math.max(...times)
  const first = Math.min(...times)
  if (wanted_h > last + SAME_TIME_H || wanted_h < first - SAME_TIME_H)
    throw new InputError(
      `${formatTime(wanted_h * 3600)} is outside the table, which runs from ${formatTime(first * 3600)} to ${formatTime(last * 3600)}`,
    )
  return times.reduce((best, time) =>
    Math.abs(time - wanted_h) < Math.abs(best - wanted_h) ? time : best,
  )
}

/** The rows at one time (all for null) as columns to show; a list becomes one column per class. */
export function shownColumns(
  rows: TableRows,
  fields: TableField[],
  time_h: number | null,
): ShownColumn[] {
  const times = rowTimes_h(rows)
  const picked = Array.from({ length: rows.rows }, (_, row) => row).filter(
    (row) => time_h === null || times === null || times[row] === time_h,
  )
  return fields.flatMap(({ name, listLength }) => {
    const values = rows.columns[name]
    if (listLength === null) return [{ name, values: picked.map((row) => values[row]) }]
    return Array.from({ length: listLength }, (_, member) => ({
      name: `${name}_${member + 1}`,
      values: picked.map((row) => values[row * listLength + member]),
    }))
  })
}
