import { existsSync, statSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { InputError } from '../model/errors.ts'
import type { TableField } from './arrow/tableField.ts'
import { type TableRows, withTable } from './arrow/tableReader.ts'
import { DONE } from './exitCodes.ts'
import { type RunRecord, readRunRecord } from './runRecord.ts'
import { chosenFields, nearestTime, rowTimes_h, shownColumns } from './shownRows.ts'
import { print, type Terminal, warn } from './terminal.ts'
import {
  csvNames,
  csvRows,
  pairLines,
  type ShownColumn,
  shortNumber,
  textTable,
} from './textTable.ts'
import { formatTime, parseTime } from './timeText.ts'

export interface ShowChoice {
  at: string | null
  variables: string[] | null
  form: 'table' | 'csv' | 'json'
  quiet: boolean
}

const TABLES = ['profiles', 'brightness', 'budget', 'size-distribution', 'state']

/** Shows an Arrow file, or of a run directory what the choice asks for. */
export async function showOutput(
  path: string,
  choice: ShowChoice,
  terminal: Terminal,
): Promise<number> {
  const full = resolve(terminal.workingDirectory, path)
  const stat = statSync(full, { throwIfNoEntry: false })
  if (stat === undefined) throw new InputError(`there is no ${path}`)
  if (!stat.isDirectory()) return showTable(full, choice, terminal)
  const record = readRunRecord(full)
  if (choice.at === null && choice.variables === null && choice.form !== 'csv')
    return showRecord(record, full, choice, terminal)
  return showTable(await tableWith(full, choice.variables), choice, terminal)
}

/** The first table of a run that has all the variables; the profiles if none does, for the sake of their message. */
async function tableWith(directory: string, variables: string[] | null): Promise<string> {
  const paths = TABLES.map((table) => join(directory, `${table}.arrow`)).filter(existsSync)
  for (const path of paths) {
    const names = await withTable(path, async ({ fields }) => fields.map(({ name }) => name))
    if (variables === null || variables.every((name) => names.includes(name))) return path
  }
  return paths[0] ?? join(directory, 'profiles.arrow')
}

async function showRecord(
  record: RunRecord,
  directory: string,
  choice: ShowChoice,
  terminal: Terminal,
): Promise<number> {
  if (choice.form === 'json') {
    await print(terminal, `${JSON.stringify(record)}\n`)
    return DONE
  }
  const summary = Object.entries(record.summary).map(([name, value]): [string, string] => [
    name,
    value === null ? '-' : shortNumber(value),
  ])
  await print(terminal, `${record.title} (${record.status})\n${pairLines(summary)}`)
  for (const warning of record.warnings) await print(terminal, `  warning: ${warning}\n`)
  await print(terminal, '\n')
  return showTable(join(directory, 'brightness.arrow'), choice, terminal)
}

async function showTable(path: string, choice: ShowChoice, terminal: Terminal): Promise<number> {
  const fields = await withTable(path, async (head) => chosenFields(head.fields, choice.variables))
  const time_h = await timeToShow(path, choice, terminal)
  await withTable(path, async (_head, batches) => {
    if (choice.form === 'csv') await printCsv(fields, batches, time_h, terminal)
    else await printWhole(fields, batches, { time_h, form: choice.form }, terminal)
  })
  return DONE
}

/** Every output time of a table, h, in order. */
async function timesOf(path: string): Promise<Set<number>> {
  return withTable(path, async (_head, batches) => {
    const times_h = new Set<number>()
    for await (const batch of batches)
      for (const time_h of rowTimes_h(batch) ?? []) times_h.add(time_h)
    return times_h
  })
}

/** The one time to show; null for all. A profile on the screen is shown at one time. */
async function timeToShow(
  path: string,
  choice: ShowChoice,
  terminal: Terminal,
): Promise<number | null> {
  if (choice.at !== null) return nearestTime(await timesOf(path), parseTime(choice.at) / 3600)
  const isProfile = await withTable(path, async ({ fields }) =>
    fields.some(({ name }) => name === 'altitude_km'),
  )
  if (choice.form !== 'table' || !isProfile) return null
  const times_h = await timesOf(path)
  const last_h = nearestTime(times_h, Math.max(...times_h))
  if (!choice.quiet)
    warn(
      terminal,
      `the last of ${times_h.size} times, ${formatTime(last_h * 3600)}; --at 12h shows another, --csv all`,
    )
  return last_h
}

async function printCsv(
  fields: TableField[],
  batches: AsyncGenerator<TableRows>,
  time_h: number | null,
  terminal: Terminal,
): Promise<void> {
  const empty = { rows: 0, columns: Object.fromEntries(fields.map(({ name }) => [name, []])) }
  await print(terminal, csvNames(shownColumns(empty, fields, null)))
  for await (const batch of batches)
    await print(terminal, csvRows(shownColumns(batch, fields, time_h)))
}

async function printWhole(
  fields: TableField[],
  batches: AsyncGenerator<TableRows>,
  { time_h, form }: { time_h: number | null; form: 'table' | 'json' },
  terminal: Terminal,
): Promise<void> {
  const whole: ShownColumn[] = []
  for await (const batch of batches)
    shownColumns(batch, fields, time_h).forEach((column, i) => {
      const values = [
        ...((whole[i]?.values ?? []) as (number | string)[]),
        ...Array.from(column.values),
      ]
      whole[i] = { name: column.name, values }
    })
  if (form === 'table') await print(terminal, textTable(whole))
  else await print(terminal, `${JSON.stringify(jsonOf(whole, fields))}\n`)
}

/** NaN becomes null. */
function jsonOf(columns: ShownColumn[], fields: TableField[]) {
  return {
    variables: fields.map(({ name, unit, longName }) => ({ name, unit, long_name: longName })),
    columns: Object.fromEntries(columns.map(({ name, values }) => [name, Array.from(values)])),
  }
}
