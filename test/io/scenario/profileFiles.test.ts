import { mkdirSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { scenarioFiles } from './scenarioFiles.ts'

const files = scenarioFiles()

const SCENARIO = `temperature:
  file:
    path: air.csv
    altitude: {column: z, unit: m}
    value: {column: T, unit: K}
`

function withTable(csv: string | Uint8Array): void {
  files.write('night.yaml', SCENARIO)
  files.write('air.csv', csv)
}

describe('a profile from a CSV file', () => {
  it('is inlined as a table in the units of the scenario', () => {
    withTable('# measured\n"z", p, T\r\n70000, 1, 220.5\n\n83100, 2, 150\n100000, 3, 190\n')
    const { document, scenario } = files.load('night.yaml')
    expect(document.temperature).toMatchObject({
      table: { altitude_km: [70, 83.1, 100], temperature_K: [220.5, 150, 190] },
    })
    expect(document.temperature).not.toHaveProperty('file')
    expect(scenario.background.temperature_K.values).toEqual([[220.5, 150, 190]])
  })

  it('gives the same run from the inlined document without the file', () => {
    withTable('z,T\n70000,220\n100000,190\n')
    const { document, scenario } = files.load('night.yaml')
    files.write('inlined.json', JSON.stringify(document))
    expect(files.load('inlined.json').scenario).toEqual(scenario)
  })

  it.each([
    ['water', 'mol/mol', '4e-6', 'water_ppmv', 4],
    ['wind', 'm/s', '0.02', 'wind_cm_per_s', 2],
    ['nuclei', '1/m3', '2e9', 'nuclei_per_cm3', 2000],
    ['photolysis', 'h', '36', 'lifetime_d', 1.5],
  ])('of %s may be in %s', (name, unit, written, key, value) => {
    files.write(
      'a.yaml',
      `${name}: {file: {path: a.csv, altitude: {column: z, unit: km}, value: {column: x, unit: ${unit}}}}\n`,
    )
    files.write('a.csv', `z,x\n70,${written}\n100,${written}\n`)
    const { document } = files.load('a.yaml')
    expect(document).toHaveProperty([name, 'table', key], [value, value])
  })

  it('is looked for beside the file that names it, also when another extends that', () => {
    mkdirSync(files.path('inner'))
    files.write('inner/base.yaml', SCENARIO)
    files.write('inner/air.csv', 'z,T\n70000,220\n100000,190\n')
    files.write('child.yaml', 'extends: inner/base.yaml\ntemperature: {offset_K: 1}\n')
    expect(files.load('child.yaml').scenario.background.temperature_K.values).toEqual([[221, 191]])
  })

  it.each<[string, string | Uint8Array, string]>([
    [
      'a ragged row',
      'z,T\n70000,220\n80000\n',
      'air.csv:3: 1 fields; allowed: 2, as in the header',
    ],
    ['a missing column', 'z,temp\n70000,220\n', 'air.csv:1: no column T; columns there: z, temp'],
    ['a column twice', 'z,T,T\n70000,220,1\n', 'air.csv:1: column T stands there twice'],
    [
      'a word for a number',
      'z,T\n70000,220\n80000,cold\n',
      'air.csv:3: column T: "cold" is not allowed; allowed: a number',
    ],
    ['a gap', 'z,T\n70000,\n', 'air.csv:2: column T: "" is not allowed; allowed: a number'],
    ['a NaN', 'z,T\n70000,NaN\n', 'air.csv:2: column T: "NaN" is not allowed'],
    ['an infinity', 'z,T\n70000,Infinity\n', 'air.csv:2: column T: "Infinity" is not allowed'],
    ['no rows', 'z,T\n', 'air.csv: no rows; allowed: a header line and one line per value'],
    ['nothing', '', 'night.yaml:3:11: file air.csv is empty'],
    ['binary', new Uint8Array([0, 1]), 'night.yaml:3:11: file air.csv is binary'],
    [
      'an unsorted profile',
      'z,T\n70000,220\n100000,190\n90000,150\n',
      'air.csv:4:1: temperature.table.altitude_km.2: 90 after 100 is not allowed; allowed: increasing altitudes',
    ],
    [
      'a temperature of 0 K',
      '#\nz,T\n70000,0\n100000,190\n',
      'air.csv:3:1: temperature.table.temperature_K.0: 0 is not allowed',
    ],
    [
      'a profile too short',
      'z,T\n70000,220\n90000,150\n',
      'night.yaml:3:11: temperature.table: covers 70 to 90 km',
    ],
  ])('with %s is refused', (_, csv, message) => {
    withTable(csv)
    expect(files.refusal('night.yaml')).toContain(message)
  })

  it('that is missing is asked for where the scenario names it', () => {
    files.write('night.yaml', SCENARIO)
    expect(files.refusal('night.yaml')).toBe('night.yaml:3:11: file air.csv does not exist')
    expect(files.refusal('night.yaml', 'temperature.file.path=b.csv')).toBe(
      '--set temperature.file.path=b.csv: file b.csv does not exist',
    )
  })

  it('in a foreign unit or beside knots is refused', () => {
    withTable('z,T\n70000,220\n100000,190\n')
    expect(files.refusal('night.yaml', 'temperature.file.value.unit=C')).toContain(
      'temperature.file.value.unit: "C" is not allowed; allowed: one of K',
    )
    files.write(
      'night.yaml',
      `${SCENARIO}  knots: [{altitude_km: 70, temperature_K: 1}, {altitude_km: 99, temperature_K: 1}]\n`,
    )
    expect(files.refusal('night.yaml')).toBe(
      'night.yaml:2:3: temperature.file: stands beside knots; allowed: one of them',
    )
  })
})

describe('a measured temperature table from a CSV file', () => {
  const MEASURED = `temperature:
  measured:
    file:
      path: t.csv
      time: {column: t, unit: min}
      altitude: {column: z, unit: km}
      temperature: {column: T, unit: K}
`

  it('is put together from its rows in any order', () => {
    files.write('a.yaml', MEASURED)
    files.write('t.csv', 't,z,T\n60,80,162\n0,80,160\n0,90,130\n60,90,131\n')
    expect(files.load('a.yaml').scenario.background.temperatureTable_K).toEqual({
      altitudes_m: [80000, 90000],
      times_s: [0, 3600],
      values: [
        [160, 130],
        [162, 131],
      ],
      logarithmic: false,
    })
  })

  it.each([
    [
      't,z,T\n0,80,160\n0,90,130\n60,80,162\n',
      't.csv: no temperature at 1 h, 90 km; allowed: every altitude at every time',
    ],
    ['t,z,T\n0,80,160\n0,80,161\n0,90,130\n', 't.csv:3:1: 0 h, 80 km stands there twice'],
    [
      't,z,T\n0,80,-1\n0,90,130\n',
      't.csv:2:1: temperature.measured.temperature_K.0.0: -1 is not allowed',
    ],
  ])('%j is refused', (csv, message) => {
    files.write('a.yaml', MEASURED)
    files.write('t.csv', csv)
    expect(files.refusal('a.yaml')).toContain(message)
  })
})
