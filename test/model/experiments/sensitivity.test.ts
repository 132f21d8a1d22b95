import { describe, expect, it } from 'vitest'
import {
  type SensitivityRow,
  sensitivityTable,
} from '../../../src/model/experiments/sensitivity.ts'
import {
  memberDiagnostics,
  memberDocument,
  memberParameters,
  parseStudy,
  planStudy,
  type StudyInput,
  type StudyPlan,
} from '../../../src/model/experiments/study.ts'
import { run, tinyNight } from './tinyNight.ts'

const DIAGNOSTICS = ['albedo_532nm_per_sr']
const base = tinyNight({
  channels: [{ name: '532nm', wavelength_nm: 532, geometry: 'albedo' }],
})

function plan(study: StudyInput): StudyPlan {
  return planStudy(parseStudy({ diagnostics: DIAGNOSTICS, ...study }), base)
}

type Numbers = Record<string, number>

/** The results of an invented law in place of the model. */
function resultsOf(made: StudyPlan, law: (parameters: Numbers) => number | null) {
  return Array.from({ length: made.memberCount }, (_, index) => ({
    [DIAGNOSTICS[0]]: law(memberParameters(made, index) as Numbers),
  }))
}

function rowsOf(table: SensitivityRow[], axis: string): SensitivityRow[] {
  return table.filter((row) => row.axis === axis)
}

/** y = x^1.7 exp(-0.3 T): slopes known in closed form; invented. */
const law = ({ 'water.factor': water, 'temperature.offset_K': offset }: Numbers) =>
  water ** 1.7 * Math.exp(-0.3 * offset)

const GRID: StudyInput = {
  axes: [
    { key: 'water.factor', log: { from: 0.5, to: 4, count: 4 } },
    { key: 'temperature.offset_K', list: [2, -2, 0] },
  ],
}

describe('the slopes of a grid', () => {
  it('are d ln y/d ln x for positive quantities, d ln y per K for temperature, line by line and over all', () => {
    const made = plan(GRID)
    const table = sensitivityTable(made, resultsOf(made, law))
    const water = rowsOf(table, 'water.factor')
    expect(water.map(({ where }) => where)).toEqual([
      null,
      'temperature.offset_K = 2',
      'temperature.offset_K = -2',
      'temperature.offset_K = 0',
    ])
    const warm = rowsOf(table, 'temperature.offset_K')
    expect(warm.map(({ where }) => where)).toEqual([
      null,
      'water.factor = 0.5',
      'water.factor = 1',
      'water.factor = 2',
      'water.factor = 4',
    ])
    for (const [rows, slope, unit] of [
      [water, 1.7, 'd ln y/d ln x'],
      [warm, -0.3, 'd ln y per K'],
    ] as const) {
      for (const row of rows) {
        expect(row).toMatchObject({
          measure: 'slope',
          diagnostic: DIAGNOSTICS[0],
          unit,
          left_out: 0,
        })
        for (const value of [row.value, row.low, row.high]) expect(value).toBeCloseTo(slope, 12)
      }
    }
    expect(water[0].used).toBe(12)
    expect(water[1].used).toBe(4)
  })

  it('give the least and greatest local slope of a curve', () => {
    const made = plan({ axes: [{ key: 'water.factor', list: [1, 2, 4] }] })
    // ln y = (ln x)^2 over ln 2: local slopes ln 2 x 1 and ln 2 x 3 per ln 2.
    const results = resultsOf(made, ({ 'water.factor': x }) =>
      Math.exp(Math.log(x) ** 2 / Math.LN2),
    )
    const [row] = sensitivityTable(made, results)
    expect(row.where).toBeNull()
    expect(row.low).toBeCloseTo(1, 12)
    expect(row.high).toBeCloseTo(3, 12)
    expect(row.value).toBeCloseTo(2, 12)
  })

  it('take a trace for no cloud', () => {
    const made = plan(GRID)
    const results = resultsOf(made, (parameters) =>
      parameters['temperature.offset_K'] === 2 ? 1e-9 * law(parameters) : law(parameters),
    )
    const water = rowsOf(sensitivityTable(made, results), 'water.factor')
    expect(water.map(({ left_out }) => left_out).reduce((a, b) => a + b, 0)).toBeGreaterThan(0)
    expect(water[1]).toMatchObject({ value: null, used: 0, left_out: 4 })
    expect(water[0].value).toBeCloseTo(1.7, 12)
  })

  it('leave out and count what has no cloud or did not finish', () => {
    const made = plan(GRID)
    const results = resultsOf(made, (parameters) =>
      parameters['temperature.offset_K'] === 2 ? null : law(parameters),
    ).map((member, index) => (index === 1 ? null : member))
    const water = rowsOf(sensitivityTable(made, results), 'water.factor')
    expect(water[1]).toMatchObject({ value: null, low: null, high: null, used: 0, left_out: 4 })
    expect(water[2]).toMatchObject({ used: 3, left_out: 1 })
    expect(water[0]).toMatchObject({ used: 7, left_out: 5 })
    expect(water[0].value).toBeCloseTo(1.7, 12)
    const dark = sensitivityTable(
      made,
      resultsOf(made, () => 0),
    )
    expect(dark.every(({ value, used }) => value === null && used === 0)).toBe(true)
  })

  it('are per unit along an axis that passes zero, and absent along words', () => {
    const made = plan({
      axes: [
        { key: 'wind.factor', list: [-1, 0, 1] },
        { key: 'ice.slip', list: ['davies', 'epstein_stokes'] },
      ],
    })
    const table = sensitivityTable(
      made,
      resultsOf(made, (one) => Math.exp(0.5 * one['wind.factor'])),
    )
    expect(rowsOf(table, 'ice.slip')).toEqual([])
    expect(rowsOf(table, 'wind.factor')[0]).toMatchObject({ unit: 'd ln y per unit of x' })
    expect(rowsOf(table, 'wind.factor')[1].where).toBe('ice.slip = davies')
    expect(rowsOf(table, 'wind.factor')[0].value).toBeCloseTo(0.5, 12)
  })

  it('show in the model itself what the trade expects: water brightens, warmth dims', () => {
    const made = plan({
      axes: [
        { key: 'water.factor', list: [0.9, 1.1] },
        { key: 'temperature.offset_K', list: [-0.5, 0.5] },
      ],
    })
    const results = Array.from({ length: made.memberCount }, (_, index) =>
      memberDiagnostics(made, run(memberDocument(made, index))),
    )
    const table = sensitivityTable(made, results)
    expect(rowsOf(table, 'water.factor')[0].low).toBeGreaterThan(0)
    expect(rowsOf(table, 'temperature.offset_K')[0].high).toBeLessThan(0)
  })
})

const RANDOM: StudyInput = {
  samples: 64,
  axes: [
    { key: 'water.factor', log_uniform: { from: 0.5, to: 4 } },
    { key: 'temperature.offset_K', uniform: { from: -2, to: 2 } },
  ],
}

describe('a Latin hypercube', () => {
  it('gives the slopes of one plane through all members', () => {
    const made = plan({ ...RANDOM, design: 'latin_hypercube' })
    const results = resultsOf(made, law)
    const table = sensitivityTable(made, [null, ...results.slice(1)])
    expect(table.map(({ axis, unit, used, left_out }) => [axis, unit, used, left_out])).toEqual([
      ['water.factor', 'd ln y/d ln x', 63, 1],
      ['temperature.offset_K', 'd ln y per K', 63, 1],
    ])
    expect(table[0].value).toBeCloseTo(1.7, 10)
    expect(table[1].value).toBeCloseTo(-0.3, 10)
  })

  it('gives none where the members do not determine them', () => {
    const made = plan({ ...RANDOM, design: 'latin_hypercube', samples: 2 })
    const table = sensitivityTable(made, resultsOf(made, law))
    expect(table.map(({ value }) => value)).toEqual([null, null])
  })
})

describe('a Sobol design', () => {
  const made = plan({ ...RANDOM, design: 'sobol', samples: 256 })

  it('gives the shares of the variance with intervals', () => {
    // y = x1 + x2 over [0, 1) and twice that: variances 1 to 4.
    const share = ({ 'water.factor': water, 'temperature.offset_K': offset }: Numbers) =>
      Math.log2(2 * water) / 3 + (offset + 2) / 2
    const table = sensitivityTable(made, resultsOf(made, share))
    expect(table.map(({ measure, axis }) => [measure, axis])).toEqual([
      ['first order', 'water.factor'],
      ['first order', 'temperature.offset_K'],
      ['total', 'water.factor'],
      ['total', 'temperature.offset_K'],
    ])
    table.forEach((row, i) => {
      // 0.02: some times 1/256, the error of an evenly filled square.
      expect(Math.abs((row.value ?? Number.NaN) - (i % 2 === 0 ? 0.2 : 0.8))).toBeLessThan(0.02)
      expect(row.low).toBeLessThan(row.value ?? Number.NaN)
      expect(row.high).toBeGreaterThan(row.value ?? Number.NaN)
      expect(row).toMatchObject({ used: 1024, left_out: 0, unit: 'share of the variance' })
    })
  })

  it('leaves out whole blocks, of which one member is missing', () => {
    const results = resultsOf(made, law).map((member, index) => (index === 5 ? null : member))
    expect(sensitivityTable(made, results)[0]).toMatchObject({ used: 1020, left_out: 4 })
    const nothing = sensitivityTable(
      made,
      results.map(() => null),
    )
    expect(nothing.every(({ value, used }) => value === null && used === 0)).toBe(true)
  })
})
