import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  AIR_HEAT_CAPACITY,
  AIR_MOLAR_MASS,
  EARTH_RADIUS,
  GAS_CONSTANT,
  STANDARD_GRAVITY,
} from '../../../src/model/constants.ts'
import type { Column } from '../../../src/model/simulate.ts'
import { columnOf } from '../../support/column.ts'

/**
 * The textbook example (linear hydrostatic gravity waves; relations from memory, numbers computed from them):
 * N 0.02 1/s, T 150 K, g 9.55 m/s2, T' 5 K, period 1 h, vertical wavelength 10 km.
 */
const EXAMPLE = {
  buoyancyFrequency: 0.02,
  temperature_K: 150,
  gravity: 9.55,
  amplitude_K: 5,
  period_s: 3600,
  verticalWind: 1.38899,
  displacement_m: 795.83,
  limitingAmplitude_K: 9.9993,
}

/** Where gravity is that of the example, km. */
const ALTITUDE_KM = (EARTH_RADIUS * (Math.sqrt(STANDARD_GRAVITY / EXAMPLE.gravity) - 1)) / 1000

/** Index of that altitude in the half points of the column below. */
const MIDDLE = 5

/** Four cells around that altitude, with the stability of the example. */
function exampleColumn(waves: object[]): Column {
  const { buoyancyFrequency, temperature_K, gravity } = EXAMPLE
  const lapse = (buoyancyFrequency ** 2 * temperature_K) / gravity - gravity / AIR_HEAT_CAPACITY
  return columnOf({
    grid: { bottom_km: ALTITUDE_KM - 1, top_km: ALTITUDE_KM + 1, levels: 4 },
    pressure: { altitude_km: ALTITUDE_KM, pressure_Pa: 0.4 },
    temperature: {
      knots: [-8, 8].map((height) => ({
        altitude_km: ALTITUDE_KM + height,
        temperature_K: temperature_K + lapse * height * 1000,
      })),
    },
    waves: waves.map((wave) => ({ at_km: ALTITUDE_KM, start_h: -10, ...wave })),
  })
}

const hourWave = (amplitude_K: number, displacement_share = 1) => ({
  amplitude_K,
  period_h: EXAMPLE.period_s / 3600,
  vertical_wavelength_km: 10,
  displacement_share,
})

interface Course {
  times_s: number[]
  temperature_K: number[]
  displacement_m: number[]
  pressure_Pa: number[]
  densityRatio: number[]
}

/** The air at the middle point, every five seconds through one period. */
function courseAtMiddle({ atmosphere }: Column): Course {
  const basis = atmosphere.basis(0)
  const course: Course = {
    times_s: [],
    temperature_K: [],
    displacement_m: [],
    pressure_Pa: [],
    densityRatio: [],
  }
  for (let time_s = 0; time_s <= EXAMPLE.period_s; time_s += 5) {
    const air = atmosphere.read(basis, time_s, { from_s: 0, to_s: EXAMPLE.period_s })
    course.times_s.push(time_s)
    course.temperature_K.push(air.temperature_K[MIDDLE])
    course.displacement_m.push(air.displacement_m[MIDDLE])
    course.pressure_Pa.push(air.pressure_Pa[MIDDLE])
    course.densityRatio.push(air.densityRatio[MIDDLE])
  }
  return course
}

/** Central differences in time. */
const rateOf = (values: number[], times_s: number[]) =>
  values.slice(1, -1).map((_, i) => (values[i + 2] - values[i]) / (times_s[i + 2] - times_s[i]))

const largest = (values: number[]) => Math.max(...values.map(Math.abs))

describe('waveField', () => {
  it('gives the displacement and the vertical wind of the textbook example', () => {
    const { displacement_m, times_s } = courseAtMiddle(exampleColumn([hourWave(5)]))
    // 1e-4 and 1e-5: the example is given with five or six digits; central differences over 10 s miss 1e-5.
    expect(largest(displacement_m) / EXAMPLE.displacement_m).toBeCloseTo(1, 4)
    expect(largest(rateOf(displacement_m, times_s)) / EXAMPLE.verticalWind).toBeCloseTo(1, 4)
  })

  it('is coldest at a fixed altitude a quarter period after the strongest updraught', () => {
    const fixed = courseAtMiddle(exampleColumn([hourWave(5, 0)]))
    const moving = courseAtMiddle(exampleColumn([hourWave(5, 1)]))
    const updraught = rateOf(moving.displacement_m, moving.times_s)
    const coldest_s = fixed.times_s[fixed.temperature_K.indexOf(Math.min(...fixed.temperature_K))]
    const strongest_s = moving.times_s[updraught.indexOf(Math.max(...updraught)) + 1]
    // Two samples of five seconds.
    expect(Math.abs(coldest_s - strongest_s - EXAMPLE.period_s / 4)).toBeLessThanOrEqual(10)
  })

  it("ties w' to T' at all times by the adiabatic relation dT'/dt = -(N^2 T/g) w'", () => {
    const fixed = courseAtMiddle(exampleColumn([hourWave(5, 0)]))
    const moving = courseAtMiddle(exampleColumn([hourWave(5, 1)]))
    const cooling = rateOf(fixed.temperature_K, fixed.times_s)
    const updraught = rateOf(moving.displacement_m, moving.times_s)
    const { buoyancyFrequency, temperature_K, gravity } = EXAMPLE
    const factor = -(buoyancyFrequency ** 2 * temperature_K) / gravity
    // 1e-12 K/s of 9e-3 K/s: both sides are the same difference quotient.
    cooling.forEach((rate, i) => {
      expect(rate).toBeCloseTo(factor * updraught[i], 11)
    })
  })

  it('cools a displaced parcel by g/cp per metre and keeps its potential temperature', () => {
    const { times_s, temperature_K, displacement_m, pressure_Pa, densityRatio } = courseAtMiddle(
      exampleColumn([hourWave(5)]),
    )
    const kappa = GAS_CONSTANT / (AIR_MOLAR_MASS * AIR_HEAT_CAPACITY)
    times_s.forEach((_, i) => {
      const lifted = (EXAMPLE.gravity / AIR_HEAT_CAPACITY) * displacement_m[i]
      expect(temperature_K[i]).toBeCloseTo(EXAMPLE.temperature_K - lifted, 6)
      // 0.2 %: the linear wave leaves out what is of second order, parts of (g zeta/(cp T))^2 = 0.26 %.
      const adiabatic = (pressure_Pa[i] / 0.4) ** kappa
      expect(Math.abs(temperature_K[i] / EXAMPLE.temperature_K / adiabatic - 1)).toBeLessThan(2e-3)
      expect(densityRatio[i]).toBeCloseTo(
        (pressure_Pa[i] / 0.4) * (EXAMPLE.temperature_K / temperature_K[i]),
        12,
      )
    })
  })

  it('lets a wave that displaces no air change temperature alone', () => {
    const { temperature_K, displacement_m, pressure_Pa } = courseAtMiddle(
      exampleColumn([hourWave(5, 0)]),
    )
    expect(largest(displacement_m)).toBe(0)
    expect(new Set(pressure_Pa).size).toBe(1)
    expect(largest(temperature_K.map((T) => T - EXAMPLE.temperature_K))).toBeCloseTo(5, 6)
  })

  it('holds one wave at the convective limit of the textbook example', () => {
    const { temperature_K } = courseAtMiddle(exampleColumn([hourWave(30, 0)]))
    const reached = largest(temperature_K.map((T) => T - EXAMPLE.temperature_K))
    // 1e-4: the limit is given with five digits.
    expect(reached / EXAMPLE.limitingAmplitude_K).toBeCloseTo(1, 4)
  })

  it('holds the sum of two waves, each of them allowed alone, at the limit of the sum', () => {
    const longer = { ...hourWave(8, 0), vertical_wavelength_km: 20, period_h: 0.5 }
    const { temperature_K } = courseAtMiddle(exampleColumn([hourWave(8, 0), longer]))
    // Steepness: 8 K at 10 km is 0.8 of the limit, at 20 km 0.4; the sum of 1.2 is brought to 1.
    const reached = largest(temperature_K.map((T) => T - EXAMPLE.temperature_K))
    expect(reached).toBeCloseTo((8 + 8) / ((0.8 + 0.4) * (10 / EXAMPLE.limitingAmplitude_K)), 2)
  })

  it('never folds layers of air, however many and strong the waves', () => {
    const wave = fc.record({
      amplitude_K: fc.double({ min: 0, max: 60, noNaN: true }),
      period_h: fc.double({ min: 0.3, max: 24, noNaN: true }),
      vertical_wavelength_km: fc.double({ min: 2, max: 40, noNaN: true }),
      phase_deg: fc.double({ min: -180, max: 180, noNaN: true }),
      start_h: fc.constant(-5),
    })
    fc.assert(
      fc.property(fc.array(wave, { minLength: 1, maxLength: 40 }), (waves) => {
        const { atmosphere } = columnOf({ grid: { levels: 40 }, waves })
        const basis = atmosphere.basis(0)
        for (const time_s of [0, 5000, 40_000]) {
          const air = atmosphere.read(basis, time_s, { from_s: 0, to_s: 86_400 })
          for (const Z of air.stretching) expect(1 + Z).toBeGreaterThanOrEqual(0.3 - 1e-12)
          for (const T of air.temperature_K) expect(T).toBeGreaterThan(0)
        }
      }),
      { seed: 20260701, numRuns: 60 },
    )
  })

  it('grows upward as exp(z/2H) until it is held', () => {
    const { atmosphere, grid } = columnOf({
      temperature: {
        knots: [0, 150].map((altitude_km) => ({ altitude_km, temperature_K: 150 })),
      },
      waves: [
        {
          amplitude_K: 0.5,
          at_km: 80,
          period_h: 1,
          vertical_wavelength_km: 12,
          displacement_share: 0,
          start_h: -5,
        },
      ],
    })
    const basis = atmosphere.basis(0)
    // Over a quarter period the cosine and the sine of the phase give the amplitude.
    const anomalyAt = (time_s: number) =>
      atmosphere.read(basis, time_s, { from_s: 0, to_s: 3600 }).temperature_K.map((T) => T - 150)
    const [cosine, sine] = [anomalyAt(0), anomalyAt(900)]
    const amplitude = cosine.map((c, i) => Math.hypot(c, sine[i]))
    const { density_per_m3 } = basis.rest
    // Isothermal air: exp(z/2H) is the inverse square root of density.
    const ratio = amplitude.map((A, i) => A * Math.sqrt(density_per_m3[i]))
    // 1e-5: trapezoidal sums over half cells of 74 m of a gravity that falls by 0.6 %.
    for (const value of ratio) expect(value / ratio[0]).toBeCloseTo(1, 5)
    const at80 = grid.halfPoints_m.findIndex((z) => z > 80_000)
    expect(amplitude[at80]).toBeCloseTo(0.5, 2)
  })
})
