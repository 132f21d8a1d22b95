import { type FileHandle, open } from 'node:fs/promises'
import {
  type AsyncRecordBatchFileReader,
  type Data,
  type RecordBatch,
  RecordBatchReader,
  Vector,
} from 'apache-arrow'
import { InputError } from '../../model/errors.ts'
import { type TableField, tableField } from './tableField.ts'

/** Some rows of a table: per column one value per row (null as NaN or empty text), or `listLength` values per row. */
export interface TableRows {
  rows: number
  columns: Record<string, Float64Array | string[]>
}

export interface TableHead {
  fields: TableField[]
  metadata: Map<string, string>
}

const MAGIC = 'ARROW1'

async function checkIsComplete(file: FileHandle, path: string): Promise<void> {
  const stat = await file.stat()
  if (!stat.isFile()) throw new InputError(`${path} is not a file`)
  const ends = Buffer.alloc(2 * MAGIC.length)
  if (stat.size > ends.length) {
    await file.read(ends, 0, MAGIC.length, 0)
    await file.read(ends, MAGIC.length, MAGIC.length, stat.size - MAGIC.length)
  }
  if (!ends.toString('latin1').startsWith(MAGIC))
    throw new InputError(`${path} is not an Arrow file`)
  if (!ends.toString('latin1').endsWith(MAGIC))
    throw new InputError(`${path} is cut off: its run did not close it, so it cannot be read`)
}

function numbersOf(data: Data): Float64Array {
  const values = data.values as Float64Array
  if (data.nullCount === 0) return values.subarray(0, data.length)
  return values.slice(0, data.length).map((value, row) => (data.getValid(row) ? value : Number.NaN))
}

function rowsOf(batch: RecordBatch, fields: TableField[]): TableRows {
  const columns: TableRows['columns'] = {}
  fields.forEach((field, i) => {
    const data = batch.data.children[i]
    if (field.type === 'text')
      columns[field.name] = Array.from(new Vector([data]), (text) => text ?? '')
    else columns[field.name] = numbersOf(field.listLength === null ? data : data.children[0])
  })
  return { rows: batch.numRows, columns }
}

async function openFile(path: string): Promise<FileHandle> {
  try {
    return await open(path, 'r')
  } catch (error) {
    throw new InputError(`${path} cannot be read: ${(error as Error).message}`)
  }
}

/**
 * Reads a table batch by batch, so that a long one needs little memory.
 *
 * @param use receives the head of the table and its batches in order; the file is closed when it returns
 */
export async function withTable<Result>(
  path: string,
  use: (head: TableHead, batches: AsyncGenerator<TableRows>) => Promise<Result>,
): Promise<Result> {
  const file = await openFile(path)
  try {
    await checkIsComplete(file, path)
    const reader = (await RecordBatchReader.from(file)) as AsyncRecordBatchFileReader
    await reader.open({ autoDestroy: false })
    const fields = reader.schema.fields.map(tableField)
    const batches = async function* () {
      for (let i = 0; i < reader.numRecordBatches; i++) {
        const batch = await reader.readRecordBatch(i)
        if (batch === null) throw new InputError(`${path} is damaged: batch ${i} cannot be read`)
        yield rowsOf(batch, fields)
      }
    }
    return await use({ fields, metadata: reader.schema.metadata }, batches())
  } finally {
    await file.close().catch(() => {})
  }
}

/** A whole table at once. */
export async function readTable(path: string): Promise<TableHead & TableRows> {
  return withTable(path, async (head, batches) => {
    const parts: TableRows[] = []
    for await (const part of batches) parts.push(part)
    const columns = Object.fromEntries(
      head.fields.map(({ name }) => [name, joined(parts.map((part) => part.columns[name]))]),
    )
    return { ...head, rows: parts.reduce((sum, part) => sum + part.rows, 0), columns }
  })
}

function joined(parts: (Float64Array | string[])[]): Float64Array | string[] {
  if (parts.some((part) => Array.isArray(part))) return (parts as string[][]).flat()
  const numbers = new Float64Array(parts.reduce((sum, part) => sum + part.length, 0))
  let at = 0
  for (const part of parts as Float64Array[]) {
    numbers.set(part, at)
    at += part.length
  }
  return numbers
}
