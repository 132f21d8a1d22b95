import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { tableFromIPC } from 'apache-arrow'
import fc from 'fast-check'
import { readParquet, Table, writeParquet } from 'parquet-wasm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { listField, scalarFields } from '../../../src/io/arrow/tableField.ts'
import { readTable } from '../../../src/io/arrow/tableReader.ts'
import { type TableShape, TableWriter } from '../../../src/io/arrow/tableWriter.ts'
import type { Variable } from '../../../src/model/diagnostics/variables.ts'

const TEMPERATURE: Variable = {
  name: 'temperature_K',
  longName: 'temperature of the air',
  unit: 'K',
  standardName: 'air_temperature',
  type: 'number',
}
const CHANNEL: Variable = {
  name: 'channel',
  longName: 'channel',
  unit: '',
  standardName: null,
  type: 'text',
}
const NUMBER: Variable = {
  name: 'number_per_class_per_m3',
  longName: 'ice particles per size class',
  unit: 'm-3',
  standardName: null,
  type: 'number',
}
const SHAPE: TableShape = {
  fields: [...scalarFields([TEMPERATURE, CHANNEL]), listField(NUMBER, 3)],
  metadata: [
    ['title', 'a table for a test'],
    ['class_radii_nm', '1 2 3'],
  ],
  rowsPerBatch: 4,
}

let directory: string
beforeAll(() => {
  directory = mkdtempSync(join(tmpdir(), 'mesofrost-table-'))
})
afterAll(() => rmSync(directory, { recursive: true }))

interface Row {
  temperature: number
  channel: string
  number: [number, number, number]
}

/** Writes rows in portions of the given sizes (repeated) and returns the path. */
function write(name: string, rows: Row[], portions: number[]): string {
  const path = join(directory, name)
  rmSync(path, { force: true })
  const writer = new TableWriter(path, SHAPE)
  for (let at = 0, turn = 0; at < rows.length; turn++) {
    const part = rows.slice(at, at + portions[turn % portions.length])
    writer.append(
      {
        temperature_K: part.map((row) => row.temperature),
        channel: part.map((row) => row.channel),
        number_per_class_per_m3: part.flatMap((row) => row.number),
      },
      part.length,
    )
    at += part.length
  }
  writer.close()
  return path
}

const someRows: Row[] = Array.from({ length: 11 }, (_, i) => ({
  temperature: i % 3 === 1 ? Number.NaN : 130 + i / 7,
  channel: i % 2 ? 'µ 532 nm' : '',
  number: [i, i / 3, 1e12 * i],
}))

const rowArbitrary = fc.record({
  temperature: fc.oneof(fc.constant(Number.NaN), fc.double({ noNaN: true })),
  channel: fc.string({ unit: 'grapheme' }),
  number: fc.tuple(
    fc.double({ noNaN: true }),
    fc.double({ noNaN: true }),
    fc.double({ noNaN: true }),
  ),
})

describe('TableWriter', () => {
  it('returns every value, with null for NaN, however the rows came in', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(rowArbitrary, { maxLength: 20 }),
        fc.array(fc.integer({ min: 1, max: 9 }), { minLength: 1, maxLength: 3 }),
        async (rows, portions) => {
          const table = await readTable(write('any.arrow', rows, portions))
          expect(table.rows).toBe(rows.length)
          expect([...table.columns.temperature_K]).toEqual(rows.map((row) => row.temperature))
          expect([...table.columns.channel]).toEqual(rows.map((row) => row.channel))
          expect([...table.columns.number_per_class_per_m3]).toEqual(
            rows.flatMap((row) => row.number),
          )
        },
      ),
      { seed: 20070624, numRuns: 60 },
    )
  })

  it('writes equal bytes for equal rows, whatever portions they came in', () => {
    const whole = readFileSync(write('whole.arrow', someRows, [11]))
    const portioned = readFileSync(write('portioned.arrow', someRows, [1, 5, 2]))
    expect(portioned.equals(whole)).toBe(true)
  })

  it('keeps unit, long name and standard name of every column and the metadata of the table', async () => {
    const { fields, metadata } = await readTable(write('named.arrow', someRows, [11]))
    expect(fields).toEqual(SHAPE.fields)
    expect([...metadata]).toEqual(SHAPE.metadata)
  })

  it('cuts the table into batches of the declared size', () => {
    const table = tableFromIPC(readFileSync(write('batches.arrow', someRows, [3])))
    expect(table.batches.map((batch) => batch.numRows)).toEqual([4, 4, 3])
  })

  it('is read by an independent reader as a stream behind the magic bytes', () => {
    const file = readFileSync(write('stream.arrow', someRows, [11]))
    expect(file.subarray(0, 8).toString('latin1')).toBe('ARROW1\0\0')
    const stream = Table.fromIPCStream(file.subarray(8))
    const again = tableFromIPC(readParquet(writeParquet(stream)).intoIPCStream())
    expect(again.numRows).toBe(11)
    expect(again.schema.fields[0].metadata.get('standard_name')).toBe('air_temperature')
    expect(again.toArray().map((row) => row.temperature_K ?? Number.NaN)).toEqual(
      someRows.map((row) => row.temperature),
    )
    expect(again.toArray().map((row) => [...row.number_per_class_per_m3])).toEqual(
      someRows.map((row) => row.number),
    )
  })

  it('writes a readable table without rows', async () => {
    const table = await readTable(write('empty.arrow', [], [1]))
    expect(table.rows).toBe(0)
    expect(table.fields).toEqual(SHAPE.fields)
  })

  it('refuses a column of the wrong length by name', () => {
    const writer = new TableWriter(join(directory, 'short.arrow'), SHAPE)
    const short = { temperature_K: [1, 2], channel: ['a', 'b'], number_per_class_per_m3: [1] }
    expect(() => writer.append(short, 2)).toThrow(
      'column number_per_class_per_m3 has 1 values where 6 are due',
    )
    writer.abandon()
  })

  it('never overwrites a file', () => {
    write('kept.arrow', someRows, [11])
    expect(() => new TableWriter(join(directory, 'kept.arrow'), SHAPE)).toThrow('EEXIST')
  })
})
