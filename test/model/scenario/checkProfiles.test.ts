import { describe, expect, it } from 'vitest'
import { refusal } from './refusal.ts'

const measured = {
  time_h: [0, 1],
  altitude_km: [80, 90],
  temperature_K: [
    [1, 2],
    [3, 4],
  ],
}
const temperature = (altitude_km: number[], temperature_K: number[]) => ({
  temperature: { table: { altitude_km, temperature_K } },
})

describe('an impossible profile is refused', () => {
  it.each<[string, unknown, string]>([
    [
      'an unsorted profile',
      temperature([70, 90, 80, 100], [1, 2, 3, 4]),
      'temperature.table.altitude_km.2: 80 after 90 is not allowed; allowed: increasing altitudes',
    ],
    [
      'a repeated altitude',
      temperature([70, 70, 100], [1, 2, 3]),
      'temperature.table.altitude_km.1: 70 after 70',
    ],
    [
      'lists of different length',
      temperature([70, 100], [200, 190, 180]),
      'temperature.table: has 2 altitudes but 3 values',
    ],
    [
      'a profile that leaves out the top',
      temperature([70, 90], [200, 190]),
      'temperature.table: covers 70 to 90 km; allowed: a profile that covers the grid, 77 to 96 km',
    ],
    [
      'a temperature of 0 K',
      temperature([70, 100], [200, 0]),
      'temperature.table.temperature_K.1: 0 is not allowed; allowed: a number above 0',
    ],
    [
      'an offset down to 0 K',
      { temperature: { offset_K: -129 } },
      'temperature.offset_K: -129 brings the coldest 129 K down to 0 K; allowed: temperatures above 0 K',
    ],
    [
      'a pressure outside the profile',
      { pressure: { altitude_km: 60 } },
      'pressure.altitude_km: 60 is not allowed; allowed: an altitude inside the temperature profile, 70 to 100 km',
    ],
    [
      'two forms of a profile',
      { water: { knots: [], table: {} } },
      'water.knots: [] is not allowed',
    ],
    [
      'knots beside a file',
      { wind: { table: { altitude_km: [1, 2], wind_cm_per_s: [1, 2] }, series: [{ time_h: 0 }] } },
      'wind.series: stands beside table; allowed: one of them',
    ],
    [
      'a series without values',
      { wind: { series: [{ time_h: 0 }] } },
      'wind.series.0: needs knots or a table beside time_h',
    ],
    [
      'a file that nobody read',
      {
        wind: {
          file: {
            path: 'a',
            altitude: { column: 'z', unit: 'km' },
            value: { column: 'w', unit: 'm/s' },
          },
        },
      },
      'wind.file: is not read yet',
    ],
    [
      'a water handle beside a factor',
      { water: { factor: 2, at_83km_ppmv: 3 } },
      'water.at_83km_ppmv: stands beside factor 2; allowed: one of them',
    ],
    [
      'times that go back',
      { water: { series: [series(1, [70, 100]), series(0, [70, 100])] } },
      'water.series.1.time_h: 0 after 1 is not allowed; allowed: increasing times',
    ],
    [
      'a series of differing altitudes',
      { water: { series: [series(0, [70, 100]), series(1, [71, 100])] } },
      'water.series.1.table: has other altitudes than the first time',
    ],
    [
      'a measured table half given',
      { temperature: { measured: { time_h: [0] } } },
      'temperature.measured: needs time_h, altitude_km and temperature_K together, or a file',
    ],
    [
      'measured times that go back',
      { temperature: { measured: { ...measured, time_h: [1, 0] } } },
      'temperature.measured.time_h.1: 0 after 1',
    ],
    [
      'a measured table short of a time',
      { temperature: { measured: { ...measured, time_h: [0, 1, 2] } } },
      'temperature.measured.temperature_K: has 2 lists; allowed: one per time, 3',
    ],
    [
      'a ragged measured table',
      { temperature: { measured: { ...measured, temperature_K: [[1, 2], [3]] } } },
      'temperature.measured.temperature_K.1: has 1 values; allowed: one per altitude, 2',
    ],
  ])('%s', (_, document, message) => {
    expect(refusal(document)).toContain(message)
  })
})

function series(time_h: number, altitude_km: number[]) {
  return { time_h, table: { altitude_km, water_ppmv: altitude_km.map(() => 3) } }
}
