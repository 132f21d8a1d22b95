import { randomBytes } from 'node:crypto'
import { renameSync, rmSync } from 'node:fs'
import { basename, dirname, join } from 'node:path'
import type { TableField, TableMetadata } from '../arrow/tableField.ts'
import { TableWriter } from '../arrow/tableWriter.ts'

/** One row by field name; null where there is no value, a list for a list field. */
export type Row = Record<string, number | string | null | readonly number[]>

const ROWS_PER_BATCH = 1024

function cellsOf(field: TableField, row: Row): readonly (number | string | null)[] {
  const value = row[field.name]
  if (Array.isArray(value)) return value
  if (field.type === 'number') return [(value as number | null) ?? Number.NaN]
  return [value as string | null]
}

function appendRow(table: TableWriter, fields: readonly TableField[], row: Row): void {
  table.append(Object.fromEntries(fields.map((field) => [field.name, cellsOf(field, row)])), 1)
}

/** Writes rows as they come into an Arrow file, which takes the place of an earlier one only when it is complete. */
export function writeRows(
  path: string,
  { fields, metadata }: { fields: TableField[]; metadata: TableMetadata },
  rows: Iterable<Row>,
): void {
  const random = randomBytes(4).toString('hex')
  const partial = join(dirname(path), `.${basename(path)}.partial-${random}`)
  const table = new TableWriter(partial, { fields, metadata, rowsPerBatch: ROWS_PER_BATCH })
  try {
    for (const row of rows) appendRow(table, fields, row)
    table.close()
    renameSync(partial, path)
  } catch (error) {
    table.abandon()
    rmSync(partial, { force: true })
    throw error
  }
}
