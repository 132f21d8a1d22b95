import { describe, expect, it } from 'vitest'
import { runMember } from '../../../src/model/experiments/runMember.ts'
import { scalarKeys } from '../../../src/model/experiments/scalarKeys.ts'
import {
  memberDiagnostics,
  memberDocument,
  memberParameters,
  parseStudy,
  planStudy,
  type StudyInput,
  type StudyPlan,
  studyJsonSchema,
} from '../../../src/model/experiments/study.ts'
import { summaryNames } from '../../../src/model/experiments/studyDiagnostics.ts'
import type { ScenarioDocument } from '../../../src/model/scenario/schema.ts'
import { refusalOf, run, seriesOf, tinyNight } from './tinyNight.ts'

const night = tinyNight({ waves: [{ amplitude_K: 2, period_h: 2, vertical_wavelength_km: 10 }] })

function plan(study: StudyInput, base: ScenarioDocument = night, maxMembers?: number): StudyPlan {
  return planStudy(parseStudy(study), base, maxMembers === undefined ? {} : { maxMembers })
}

function parametersOf(made: StudyPlan) {
  return Array.from({ length: made.memberCount }, (_, index) => memberParameters(made, index))
}

describe('a study', () => {
  it('on a grid has every combination of values', () => {
    const made = plan({
      axes: [
        { key: 'water.factor', log: { from: 0.5, to: 2, count: 3 } },
        { key: 'temperature.offset_K', linear: { from: -2, to: 2, count: 2 } },
        { key: 'processes.wind', list: [true, false] },
      ],
    })
    expect(made.memberCount).toBe(12)
    expect(parametersOf(made).slice(0, 5)).toEqual([
      { 'water.factor': 0.5, 'temperature.offset_K': -2, 'processes.wind': 'true' },
      { 'water.factor': 0.5, 'temperature.offset_K': -2, 'processes.wind': 'false' },
      { 'water.factor': 0.5, 'temperature.offset_K': 2, 'processes.wind': 'true' },
      { 'water.factor': 0.5, 'temperature.offset_K': 2, 'processes.wind': 'false' },
      { 'water.factor': 1, 'temperature.offset_K': -2, 'processes.wind': 'true' },
    ])
  })

  it('makes members that equal the scenario with the values written into it', () => {
    const made = plan({
      axes: [
        { key: 'water.at_83km_ppmv', list: [3, 6] },
        { key: 'waves.0.amplitude_K', list: [0, 4] },
        { key: 'ice.saturation', list: ['iapws_2011'] },
        { key: 'random_waves.rms_K', list: [1] },
      ],
    })
    expect(memberDocument(made, 3)).toEqual(
      tinyNight({
        water: { at_83km_ppmv: 6 },
        waves: [{ amplitude_K: 4, period_h: 2, vertical_wavelength_km: 10 }],
        ice: { saturation: 'iapws_2011' },
        random_waves: { rms_K: 1 },
      }),
    )
    expect(made.base).toBe(night)
    expect(night.waves[0].amplitude_K).toBe(2)
  })

  it('drops what an axis excludes in the base', () => {
    const base = tinyNight({ water: { at_83km_ppmv: 5 } })
    const made = plan({ axes: [{ key: 'water.factor', list: [2] }] }, base)
    expect(memberDocument(made, 0)).toEqual(tinyNight({ water: { factor: 2 } }))
  })

  it('spaces values without spoilt last digits', () => {
    const made = plan({
      axes: [{ key: 'water.factor', linear: { from: 0.1, to: 0.7, count: 7 } }],
    })
    expect(parametersOf(made).map((one) => one['water.factor'])).toEqual([
      0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7,
    ])
  })

  it('by Latin hypercube has one member per stratum of each axis', () => {
    const made = plan({
      design: 'latin_hypercube',
      samples: 20,
      axes: [
        { key: 'water.factor', uniform: { from: 0, to: 20 } },
        { key: 'mixing.factor', log_uniform: { from: 1, to: 1024 } },
        { key: 'ice.slip', list: ['davies', 'epstein_stokes'] },
      ],
    })
    const members = parametersOf(made)
    const strata = (key: string, of: (value: number) => number) =>
      new Set(members.map((one) => Math.floor(of(one[key] as number)))).size
    expect(strata('water.factor', (value) => value)).toBe(20)
    expect(strata('mixing.factor', (value) => 2 * Math.log2(value))).toBe(20)
    expect(members.filter((one) => one['ice.slip'] === 'davies')).toHaveLength(10)
  })

  it('by Sobol has blocks of axes + 2 members, seeded', () => {
    const study: StudyInput = {
      design: 'sobol',
      samples: 4,
      seed: 3,
      axes: [
        { key: 'water.factor', uniform: { from: 0.5, to: 2 } },
        { key: 'temperature.offset_K', normal: { mean: 0, standard_deviation: 1 } },
      ],
    }
    const made = plan(study)
    expect(made.memberCount).toBe(16)
    expect(made.warnings).toEqual([])
    const [a, b, mixed0, mixed1] = parametersOf(made)
    expect(mixed0).toEqual({ ...a, 'water.factor': b['water.factor'] })
    expect(mixed1).toEqual({ ...a, 'temperature.offset_K': b['temperature.offset_K'] })
    expect(parametersOf(plan(study))).toEqual(parametersOf(made))
    expect(parametersOf(plan({ ...study, seed: 4 }))).not.toEqual(parametersOf(made))
    expect(plan({ ...study, samples: 5 }).warnings).toEqual([
      '5 samples do not fill the Sobol design evenly; a power of two does',
    ])
  })

  it('plans many members without making them', () => {
    const axis = (key: string) => ({ key, uniform: { from: 0.5, to: 2 } })
    const axes = ['water.factor', 'mixing.factor', 'nuclei.factor'].map(axis)
    const made = plan({ design: 'sobol', samples: 16_384, axes })
    expect(made.memberCount).toBe(81_920)
    expect(memberDocument(made, 81_919).water.factor).toBe(
      memberParameters(made, 81_919)['water.factor'],
    )
  })

  it('keeps diagnostics that runs really have', () => {
    const base = tinyNight({
      channels: [
        { name: '532nm', wavelength_nm: 532, geometry: 'backscatter' },
        { name: '260nm', wavelength_nm: 260, geometry: 'albedo' },
      ],
    })
    const outcome = run(base)
    expect(summaryNames(base)).toEqual(Object.keys(outcome.diagnostics))
    const axes = [{ key: 'water.factor', list: [1] }]
    const usual = plan({ axes }, base)
    expect(memberDiagnostics(usual, outcome)).toEqual(
      Object.fromEntries(
        Object.entries(outcome.diagnostics).filter(([name]) => !name.endsWith('_residual')),
      ),
    )
    const chosen = plan({ axes, diagnostics: ['albedo_260nm_per_sr'], last_hours_mean: 1 }, base)
    const kept = memberDiagnostics(chosen, outcome)
    expect(Object.keys(kept)).toEqual(chosen.diagnostics)
    expect(chosen.diagnostics).toEqual([
      'albedo_260nm_per_sr',
      'mean_column_ice_ug_per_m2',
      'mean_albedo_532nm_per_sr',
      'mean_albedo_532nm_mie_per_sr',
      'mean_albedo_260nm_per_sr',
      'mean_albedo_260nm_mie_per_sr',
    ])
    const last = seriesOf(outcome.headlines, 'column_ice_ug_per_m2').slice(-3)
    expect(kept.mean_column_ice_ug_per_m2).toBeCloseTo((last[0] + last[1] + last[2]) / 3, 10)
  })

  it('passes on at what times size distributions are kept', () => {
    const axes = [{ key: 'water.factor', list: [1] }]
    const made = plan({ axes, keep: { scene_times_h: [1.5, 3] } })
    const outcome = runMember(memberDocument(made, 0), made.keep)
    expect(outcome.status === 'done' && outcome.scenes.map(({ time_h }) => time_h)).toEqual([
      1.5, 3,
    ])
  })
})

describe('a study document is refused', () => {
  it.each<[unknown, string]>([
    [
      { axis: [] },
      'axis: unknown key; allowed here: title, question, base, axes, design, samples, seed, diagnostics, last_hours_mean, keep; did you mean axes?',
    ],
    [
      { axes: [{ key: 'water.factor', lst: [1] }] },
      'axes.0.lst: unknown key; allowed here: key, list, linear, log, uniform, log_uniform, normal; did you mean list?',
    ],
    [
      { axes: [], design: 'random' },
      'design: "random" is not allowed; expected one of "grid"|"latin_hypercube"|"sobol"',
    ],
    [{}, 'axes: is missing; expected array'],
    [{ axes: [{ key: 'water.factor', log: { from: 1, to: 2 } }] }, 'axes.0.log.count: is missing'],
    [{ axes: [], seed: -1 }, 'seed: -1 is not allowed'],
    ['text', 'the scenario: "text" is not allowed; expected object'],
  ])('%j', (document, message) => {
    expect(refusalOf(() => parseStudy(document))).toContain(message)
  })
})

/** Any keys that hold a number. */
const SEVENTEEN = [...scalarKeys(night)]
  .filter(([, kind]) => kind === 'number')
  .map(([key]) => key)
  .slice(0, 17)

describe('a plan is refused', () => {
  const factor = { key: 'water.factor', list: [1, 2] }
  it.each<[string, StudyInput, string]>([
    [
      'a key that does not exist',
      { axes: [{ key: 'water.facter', list: [1] }] },
      'water.facter is no key that can be varied; did you mean water.factor?',
    ],
    ['a section', { axes: [{ key: 'water', list: [1] }] }, 'water is no key that can be varied'],
    [
      'an item that does not exist',
      { axes: [{ key: 'waves.1.amplitude_K', list: [1] }] },
      'waves.1.amplitude_K is no key that can be varied: waves of the base scenario has items 0 to 0; did you mean waves.0.amplitude_K?',
    ],
    [
      'no form',
      { axes: [{ key: 'water.factor' }] },
      'water.factor has none; expected one of list, linear, log, uniform, log_uniform, normal',
    ],
    [
      'two forms',
      { axes: [{ ...factor, uniform: { from: 1, to: 2 } }] },
      'water.factor has list and uniform; expected one of',
    ],
    ['no axes', { axes: [] }, 'the design is empty: axes is; expected one or more'],
    [
      'an empty list',
      { axes: [{ key: 'water.factor', list: [] }] },
      'water.factor: its list is empty; expected at least one value',
    ],
    [
      'a value twice',
      { axes: [{ key: 'water.factor', list: [1, 2, 1] }] },
      'water.factor: a value stands twice in its list; expected each once',
    ],
    [
      'no samples',
      { axes: [factor], design: 'sobol' },
      'the design is empty: samples is missing; sobol needs it',
    ],
    ['samples of a grid', { axes: [factor], samples: 3 }, 'samples has no meaning for a grid'],
    [
      'a grid over a distribution',
      { axes: [{ key: 'water.factor', uniform: { from: 1, to: 2 } }] },
      'water.factor has a distribution; a grid needs list, linear or log',
    ],
    [
      'limits in disorder',
      { axes: [{ key: 'water.factor', uniform: { from: 2, to: 1 } }], design: 'sobol', samples: 2 },
      'water.factor: from 2 to 1; expected the lesser value first',
    ],
    [
      'a logarithm of zero',
      { axes: [{ key: 'water.factor', log: { from: 0, to: 1, count: 3 } }] },
      'water.factor: log from 0 to 1; expected values above 0',
    ],
    [
      'several equal values',
      { axes: [{ key: 'water.factor', linear: { from: 1, to: 1, count: 3 } }] },
      'water.factor: 3 values from 1 to 1; expected two or more, apart',
    ],
    [
      'the far tail',
      {
        axes: [
          {
            key: 'temperature.offset_K',
            normal: { mean: 0, standard_deviation: 1, from: 7, to: 9 },
          },
        ],
        design: 'sobol',
        samples: 2,
      },
      'temperature.offset_K: hardly anything of the normal distribution lies from 7 to 9',
    ],
    [
      'one key twice',
      { axes: [factor, factor] },
      'axes: water.factor and water.factor exclude each other; expected one of them',
    ],
    [
      'keys that exclude each other',
      { axes: [factor, { key: 'water.at_83km_ppmv', list: [5] }] },
      'axes: water.factor and water.at_83km_ppmv exclude each other',
    ],
    [
      'a value outside the range',
      {
        axes: [
          { key: 'water.factor', list: [1, 3000, 2] },
          { key: 'temperature.offset_K', list: [0, 1] },
        ],
      },
      'member 2 (water.factor = 3000, temperature.offset_K = 0): water.factor: 3000 is not allowed; allowed: a number from 0 to 1000',
    ],
    [
      'a word that is not allowed',
      { axes: [{ key: 'ice.slip', list: ['davies', 'davis'] }] },
      'member 1 (ice.slip = davis): ice.slip: "davis" is not allowed; allowed: one of epstein_stokes, davies; did you mean davies?',
    ],
    [
      'broken levels',
      { axes: [{ key: 'grid.levels', linear: { from: 20, to: 25, count: 3 } }] },
      'member 1 (grid.levels = 22.5): grid.levels: 22.5 is not allowed; allowed: a whole number from 4 to 2000',
    ],
    [
      'what is impossible together',
      { axes: [{ key: 'grid.top_km', list: [90, 70] }] },
      'member 1 (grid.top_km = 70): grid.top_km: 70 is not allowed; allowed: above bottom_km 77',
    ],
    [
      'an unknown diagnostic',
      { axes: [factor], diagnostics: ['mean_radius'] },
      'diagnostics: no mean_radius; allowed: peak_altitude_km',
    ],
    [
      'no output at that time',
      { axes: [factor], keep: { scene_times_h: [1.3] } },
      'keep.scene_times_h: no output at 1.3 h; output comes every 30 min up to 3 h',
    ],
    [
      'a mean longer than the run',
      { axes: [factor], last_hours_mean: 4 },
      'last_hours_mean: 4 is not allowed; allowed: up to the length of the run, 3 h',
    ],
    [
      'too many axes for Sobol',
      {
        axes: SEVENTEEN.map((key) => ({ key, uniform: { from: 0.5, to: 0.9 } })),
        design: 'sobol',
        samples: 2,
      },
      '17 axes; allowed for sobol: up to 16',
    ],
  ])('for %s', (_, study, message) => {
    expect(refusalOf(() => plan(study))).toContain(`Error: ${message}`)
  })

  it('for more members than allowed', () => {
    const axes = [
      { key: 'water.factor', linear: { from: 1, to: 2, count: 400 } },
      { key: 'mixing.factor', linear: { from: 1, to: 2, count: 400 } },
    ]
    expect(refusalOf(() => plan({ axes }))).toBe(
      'InputError: 160000 members (400 x 400); allowed: up to 100000',
    )
    const random: StudyInput = { axes: [{ key: 'water.factor', list: [1] }], samples: 10 }
    expect(refusalOf(() => plan({ ...random, design: 'sobol' }, night, 29))).toBe(
      'InputError: 30 members (10 samples x (1 axes + 2)); allowed: up to 29',
    )
  })
})

describe('the schema of a study', () => {
  it('tells what every key means', () => {
    const { properties } = studyJsonSchema() as {
      properties: Record<string, { description?: string }>
    }
    expect(Object.values(properties).every(({ description }) => (description ?? '') !== '')).toBe(
      true,
    )
  })
})
