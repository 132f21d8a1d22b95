import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { scalarFields } from '../../../src/io/arrow/tableField.ts'
import { TableWriter } from '../../../src/io/arrow/tableWriter.ts'
import { readNight } from '../../../src/io/figures/readNight.ts'
import { RUN_FORMAT } from '../../../src/io/runRecord.ts'
import { type Variable, variable } from '../../../src/model/diagnostics/variables.ts'

const channels = [
  { name: '355nm', geometry: 'backscatter' },
  { name: '260nm', geometry: 'albedo' },
  { name: '532nm', geometry: 'backscatter' },
]

function write(path: string, variables: Variable[], columns: Record<string, unknown[]>): void {
  const fields = scalarFields(variables)
  const writer = new TableWriter(path, { fields, metadata: [], rowsPerBatch: 100 })
  writer.append(columns as Record<string, number[]>, columns.time_h.length)
  writer.close()
}

let directory: string
beforeAll(() => {
  directory = mkdtempSync(join(tmpdir(), 'mesofrost-night-'))
  const summary = { peak_altitude_km: 83.04, ice_water_content_ng_per_m3: 41.2, thickness_km: 1.26 }
  const scenario = { duration_h: 12, channels }
  const record = { format: RUN_FORMAT, title: 'Small', summary, scenario }
  writeFileSync(join(directory, 'run.json'), JSON.stringify(record))
  write(
    join(directory, 'profiles.arrow'),
    [
      variable('time_h', 'time', 'h'),
      variable('altitude_km', 'altitude', 'km'),
      variable('saturation_ratio', 'saturation ratio', '1'),
      variable('ice_water_content_ng_per_m3', 'mass of ice per volume', 'ng m-3'),
    ],
    {
      time_h: [0, 0, 12, 12],
      altitude_km: [82, 83, 82, 83],
      saturation_ratio: [1, 2, 3, 4],
      ice_water_content_ng_per_m3: [0, 0, 5, 6],
    },
  )
  write(
    join(directory, 'brightness.arrow'),
    [
      variable('time_h', 'time', 'h'),
      { ...variable('channel', 'channel', ''), type: 'text' },
      variable('albedo_per_sr', 'albedo', 'sr-1'),
      variable('albedo_mie_per_sr', 'albedo', 'sr-1'),
    ],
    {
      time_h: [0, 0, 0, 12, 12, 12],
      channel: ['355nm', '260nm', '532nm', '355nm', '260nm', '532nm'],
      albedo_per_sr: [0, 0, 0, 3, 5, 1],
      albedo_mie_per_sr: [0, 0, 0, 2, 4, 0.5],
    },
  )
})
afterAll(() => rmSync(directory, { recursive: true }))

describe('readNight', () => {
  it('reads the fields of a run with their names and units', async () => {
    const { title, iceWaterContent } = await readNight(directory)
    expect(title).toBe('Small')
    expect(iceWaterContent).toEqual({
      longName: 'mass of ice per volume',
      unit: 'ng m-3',
      times_h: Float64Array.from([0, 12]),
      altitudes_km: Float64Array.from([82, 83]),
      values: Float64Array.from([0, 0, 5, 6]),
    })
  })

  it('takes the first channel that looks down and the first lidar', async () => {
    const { brightness } = await readNight(directory)
    expect(brightness.channels.map(({ label }) => label)).toEqual([
      '260 nm albedo',
      '355 nm backscatter',
    ])
    expect([...brightness.channels[0].rayleigh]).toEqual([0, 5])
    expect([...brightness.channels[1].mie]).toEqual([0, 2])
  })

  it('puts the layer at the end into words', async () => {
    const { description } = await readNight(directory)
    expect(description).toContain('peak at 83.0 km with 41 nanograms of ice per cubic metre')
    expect(description).toContain('1.3 km thick')
  })

  it('refuses what is not a run directory', async () => {
    await expect(readNight(tmpdir())).rejects.toThrow('is not a run directory')
  })
})
