import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { scalarFields } from '../../../src/io/arrow/tableField.ts'
import { readTable, withTable } from '../../../src/io/arrow/tableReader.ts'
import { TableWriter } from '../../../src/io/arrow/tableWriter.ts'

let directory: string
let complete: string
beforeAll(() => {
  directory = mkdtempSync(join(tmpdir(), 'mesofrost-read-'))
  complete = join(directory, 'complete.arrow')
  const fields = scalarFields([
    { name: 'time_h', longName: 'time', unit: 'h', standardName: 'time', type: 'number' },
  ])
  const writer = new TableWriter(complete, { fields, metadata: [], rowsPerBatch: 2 })
  writer.append({ time_h: [0, 1, 2, 3, 4] }, 5)
  writer.close()
})
afterAll(() => rmSync(directory, { recursive: true }))

describe('withTable', () => {
  it('hands the batches out in order', async () => {
    const times = await withTable(complete, async (_head, batches) => {
      const seen: number[][] = []
      for await (const { columns } of batches) seen.push([...(columns.time_h as Float64Array)])
      return seen
    })
    expect(times).toEqual([[0, 1], [2, 3], [4]])
  })

  it('says that a file cut off in the middle is cut off', async () => {
    const cut = join(directory, 'cut.arrow')
    writeFileSync(cut, readFileSync(complete).subarray(0, -20))
    await expect(readTable(cut)).rejects.toThrow('cut.arrow is cut off')
  })

  it('refuses what is not an Arrow file', async () => {
    const text = join(directory, 'text.arrow')
    writeFileSync(text, 'time_h,temperature_K\n0,150\n')
    await expect(readTable(text)).rejects.toThrow('text.arrow is not an Arrow file')
    await expect(readTable(directory)).rejects.toThrow('is not a file')
    await expect(readTable(join(directory, 'nothing'))).rejects.toThrow('cannot be read')
  })
})
