import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { monotoneCubic } from '../../../src/model/numerics/monotoneCubic.ts'
import { complete } from '../../../src/model/scenario/complete.ts'
import { resolve } from '../../../src/model/scenario/resolve.ts'

const background = (document: unknown) => resolve(document).scenario.background

describe('resolve', () => {
  it('takes the empty document for the quiet night', () => {
    const { scenario, warnings } = resolve({})
    expect(warnings).toEqual([])
    expect(scenario).toMatchObject({
      title: 'untitled',
      duration_s: 86400,
      outputInterval_s: 600,
      startUtc: null,
      grid: { bottom_m: 77000, top_m: 96000, levels: 128 },
      waves: [],
      perturbations: [],
      initialIce: [],
    })
    expect(scenario.ice.dragDelta).toBe(1 + Math.PI / 8)
    expect(scenario.channels.map(({ name }) => name)).toEqual(['260nm', '532nm', '355nm'])
  })

  it('turns every unit of the document into SI', () => {
    const { scenario } = resolve({
      sizes: { smallest_nm: 1, largest_nm: 150 },
      pressure: { altitude_km: 85, pressure_Pa: 0.4 },
      water: { table: { altitude_km: [70, 100], water_ppmv: [6, 0.5] } },
      wind: { knots: [at(70, 'wind_cm_per_s', 2), at(100, 'wind_cm_per_s', -3)] },
      mixing: { knots: [at(70, 'mixing_m2_per_s', 10), at(100, 'mixing_m2_per_s', 100)] },
      nuclei: { knots: [at(70, 'nuclei_per_cm3', 300), at(100, 'nuclei_per_cm3', 4000)] },
      photolysis: { knots: [at(70, 'lifetime_d', 30), at(100, 'lifetime_d', 1)] },
      nucleation: { jump_distance_nm: 0.32 },
      initial: {
        ice: [
          {
            altitude_km: 83,
            width_km: 1,
            number_per_cm3: 100,
            median_radius_nm: 45,
            geometric_width: 1.3,
          },
        ],
      },
    })
    const { background: air, sizes, initialIce, nucleation } = scenario
    expect(sizes.largest_m).toBeCloseTo(150e-9, 20)
    expect([air.referenceAltitude_m, air.referencePressure_Pa]).toEqual([85000, 0.4])
    closeTo(air.water.values[0], [6e-6, 0.5e-6])
    closeTo(air.wind_m_per_s.values[0], [0.02, -0.03])
    closeTo(air.mixing_m2_per_s.values[0], [10, 100])
    closeTo(air.nuclei_per_m3.values[0], [3e8, 4e9])
    closeTo(air.photolysisLifetime_s?.values[0] ?? [], [30 * 86400, 86400])
    closeTo([nucleation.jumpDistance_m], [0.32e-9])
    // A Gaussian of standard deviation 1 is 2 sqrt(2 ln 2) = 2.3548 wide at half its maximum.
    expect(initialIce[0].sigma_m).toBeCloseTo(1000 / 2.354820045, 6)
    expect(initialIce[0].number_per_m3).toBe(1e8)
  })

  it('interpolates what ranges over decades in the logarithm, and the rest as it is', () => {
    const air = background({})
    expect(air.temperature_K.logarithmic).toBe(false)
    expect(air.wind_m_per_s.logarithmic).toBe(false)
    for (const profile of [air.water, air.mixing_m2_per_s, air.nuclei_per_m3]) {
      expect(profile.logarithmic).toBe(true)
    }
  })

  it('gives the same scenario for a document and for the complete document', () => {
    const number = fc.double({ min: 0.5, max: 2, noNaN: true })
    const property = fc.property(number, number, fc.boolean(), (factor, offset, closed) => {
      const document = {
        temperature: { offset_K: offset },
        water: { factor },
        processes: { closed },
        random_waves: { seed: Math.round(factor * 1000) },
        waves: [{ amplitude_K: factor, period_h: 1, vertical_wavelength_km: 10 }],
      }
      const written = JSON.parse(JSON.stringify(complete(document)))
      expect(resolve(written)).toEqual(resolve(document))
    })
    fc.assert(property, { seed: 20, numRuns: 50 })
  })

  it('normalises the shares of the nuclei', () => {
    const classes = [
      { radius_nm: 1, share: 3 },
      { radius_nm: 2, share: 1 },
    ]
    const { nucleusClasses } = background({ nuclei: { classes } })
    expect(nucleusClasses.map(({ share }) => share)).toEqual([0.75, 0.25])
  })
})

describe('the scalar handles', () => {
  it('add the offset to every temperature', () => {
    const plain = background({}).temperature_K.values[0]
    const warmer = background({ temperature: { offset_K: 5 } }).temperature_K.values[0]
    expect(warmer).toEqual(plain.map((value) => value + 5))
  })

  it.each([
    ['water', 'water'],
    ['wind', 'wind_m_per_s'],
    ['mixing', 'mixing_m2_per_s'],
    ['nuclei', 'nuclei_per_m3'],
  ] as const)('multiply the %s profile', (section, key) => {
    const plain = background({})[key].values[0]
    const doubled = background({ [section]: { factor: 2 } })[key].values[0]
    closeTo(
      doubled,
      plain.map((value) => 2 * value),
    )
  })

  it('empty a profile at factor 0, which then has no logarithm', () => {
    const { nuclei_per_m3 } = background({ nuclei: { factor: 0 } })
    expect(nuclei_per_m3.logarithmic).toBe(false)
    expect(new Set(nuclei_per_m3.values[0])).toEqual(new Set([0]))
  })

  it('bring the water to a value at 83 km, between knots as the model interpolates', () => {
    const knots = [
      at(70, 'water_ppmv', 6),
      at(82, 'water_ppmv', 4),
      at(86, 'water_ppmv', 2),
      at(100, 'water_ppmv', 0.4),
    ]
    const { water } = background({ water: { knots, at_83km_ppmv: 7 } })
    const curve = monotoneCubic(water.altitudes_m, water.values[0].map(Math.log))
    // Rounding of exp and log only.
    expect(Math.exp(curve.value(83000)) / 7e-6).toBeCloseTo(1, 12)
  })
})

describe('profiles in time', () => {
  it('keep their times, at equal altitudes', () => {
    const series = [0, 48].map((time_h) => ({
      time_h,
      table: { altitude_km: [70, 100], temperature_K: [220 - time_h, 180] },
    }))
    const { temperature_K } = background({ temperature: { series } })
    expect(temperature_K.times_s).toEqual([0, 48 * 3600])
    expect(temperature_K.values).toEqual([
      [220, 180],
      [172, 180],
    ])
  })

  it('include a measured table', () => {
    const measured = {
      time_h: [0, 1],
      altitude_km: [80, 90],
      temperature_K: [
        [160, 130],
        [162, 131],
      ],
    }
    expect(background({ temperature: { measured } }).temperatureTable_K).toEqual({
      altitudes_m: [80000, 90000],
      times_s: [0, 3600],
      values: measured.temperature_K,
      logarithmic: false,
    })
  })
})

describe('switches', () => {
  it('a closed column has no photolysis, nor has one that switches it off', () => {
    expect(background({}).photolysisLifetime_s).not.toBeNull()
    expect(background({ processes: { closed: true } }).photolysisLifetime_s).toBeNull()
    expect(background({ photolysis: { enabled: false } }).photolysisLifetime_s).toBeNull()
  })

  it('an explicit refractive index goes before the table', () => {
    const channel = { name: 'x', wavelength_nm: 100, geometry: 'backscatter' }
    const index = { n: 1.4, k: 0.1 }
    const { channels } = resolve({ channels: [{ ...channel, refractive_index: index }] }).scenario
    expect(channels[0].refractiveIndex).toEqual(index)
  })

  it('an albedo looks down at 90 degrees unless told otherwise', () => {
    const channel = { name: 'uv', wavelength_nm: 260, geometry: 'albedo' }
    const [plain, slant] = resolve({
      channels: [channel, { ...channel, name: 'uv_slant', view_zenith_deg: 60 }],
    }).scenario.channels
    expect(plain.geometry).toEqual({
      kind: 'albedo',
      scatteringAngle_rad: Math.PI / 2,
      viewZenith_rad: 0,
    })
    expect(slant.geometry).toMatchObject({ viewZenith_rad: Math.PI / 3 })
  })
})

function at(altitude_km: number, key: string, value: number) {
  return { altitude_km, [key]: value }
}

/** Equal but for the rounding of one multiplication. */
function closeTo(values: readonly number[], expected: readonly number[]): void {
  expect(values).toHaveLength(expected.length)
  for (const [i, value] of values.entries()) {
    expect(Math.abs(value - expected[i])).toBeLessThanOrEqual(1e-14 * Math.abs(expected[i]))
  }
}
