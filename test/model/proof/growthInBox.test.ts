import { describe, expect, it } from 'vitest'
import { BOLTZMANN } from '../../../src/model/constants.ts'
import { type Column, initialSnapshot, type Snapshot } from '../../../src/model/simulate.ts'
import { columnTotals } from '../../../src/model/state/columnTotals.ts'
import { columnOf, finalState, NO_PROCESSES, uniform } from '../../support/column.ts'
import {
  type Box,
  grow,
  MOLECULE_VOLUME,
  moment,
  murphyKoop,
  type Population,
  uptake,
  vapourLeft,
} from '../../support/lagrangianBox.ts'
import { observedOrder } from '../../support/order.ts'

/** Four cells of isothermal air that exchange nothing: four boxes of different density. */
function boxes(temperature_K: number, hours: number, document: object): Column {
  return columnOf({
    grid: { bottom_km: 80, top_km: 88, levels: 4 },
    pressure: { altitude_km: 84, pressure_Pa: 0.6 },
    temperature: uniform('temperature_K', temperature_K),
    nucleation: { scheme: 'off' },
    processes: { ...NO_PROCESSES, growth: true, closed: true },
    duration_h: hours,
    output_every_min: 60 * hours,
    ...document,
  })
}

/** Particles of 20 nm with a standard deviation of 2.5 nm in every box, one core each. */
function withParticles(column: Column, number_per_m3: number): Snapshot {
  const { layout, sizes } = column
  const start = initialSnapshot(column)
  sizes.radii_m.forEach((r, k) => {
    const density = Math.exp(-0.5 * ((r - 20e-9) / 2.5e-9) ** 2) / (2.5e-9 * Math.sqrt(2 * Math.PI))
    const N = number_per_m3 * density * (sizes.edges_m[k + 1] - sizes.edges_m[k])
    for (let i = 0; i < layout.levels; i++) {
      start.y[layout.ice + i * layout.classes + k] = N
      start.y[layout.cores + i * layout.nucleusClasses] += N
    }
  })
  return start
}

/** The ice of one box as populations, empty classes left out. */
function particlesOf({ layout, sizes }: Column, y: Float64Array, i: number): Population[] {
  return Array.from(sizes.radii_m, (radius_m, k) => ({
    radius_m,
    number_per_m3: y[layout.ice + i * layout.classes + k],
  })).filter(({ number_per_m3 }) => number_per_m3 > 1e-6)
}

const meanRadius = (populations: Population[]) => moment(populations, 1) / moment(populations, 0)

const LEVELS = [0, 1, 2, 3]

describe('growth in a closed box', () => {
  /** Particles from 5 to 65 nm; tolerances so tight that the classes make the error. */
  const fine = (classes: number) => ({
    sizes: { smallest_nm: 5, largest_nm: 65, classes, stretching: 0.5 },
    nuclei: { classes: [{ radius_nm: 5, share: 1 }] },
    numerics: { relative_tolerance: 1e-5 },
  })

  /**
   * Without saturation pressure all radii grow by the same D: dD/dt = b (C - D^3 - 3 m1 D^2 - 3 m2 D) with the moments
   * m1 = <r>, m2 = <r^2> of the start. With the real root R of the bracket, which is (R - D)(D^2 + B D + Q),
   *   b t (R^2 + B R + Q) = [ln((D^2 + B D + Q)/(R - D)^2)/2 + ((R + B/2)/s) atan((D + B/2)/s)] from 0 to D,
   * s = sqrt(Q - B^2/4), B = R + 3 m1, Q = R^2 + 3 m1 R + 3 m2. R is the growth that freezes all vapour.
   */
  function timeToGrow(
    start: Population[],
    { vapour_per_m3, temperature_K }: Box,
    D: number,
  ): number {
    const number = moment(start, 0)
    const [m1, m2] = [moment(start, 1) / number, moment(start, 2) / number]
    const perCube = (number * (4 / 3) * Math.PI) / MOLECULE_VOLUME
    const cubic = (x: number) => x ** 3 + 3 * m1 * x ** 2 + 3 * m2 * x
    let R = 100e-9
    for (let i = 0; i < 50; i++) {
      R -= (cubic(R) - vapour_per_m3 / perCube) / (3 * (R * R + 2 * m1 * R + m2))
    }
    const [B, Q] = [R + 3 * m1, R * R + 3 * m1 * R + 3 * m2]
    const s = Math.sqrt(Q - (B * B) / 4)
    const primitive = (x: number) =>
      0.5 * Math.log((x * x + B * x + Q) / (R - x) ** 2) +
      ((R + B / 2) / s) * Math.atan((x + B / 2) / s)
    const b = uptake(temperature_K) * perCube * BOLTZMANN * temperature_K
    return (primitive(D) - primitive(0)) / (b * (R * R + B * R + Q))
  }

  it('takes the time of the closed form without Kelvin term where saturation is nothing', () => {
    const [COLD_K, hours] = [115, 4]
    const column = boxes(COLD_K, hours, { ...fine(120), water: uniform('water_ppmv', 2) })
    const start = withParticles(column, 100e6)
    const { y } = finalState(column, start)
    const leftOver = LEVELS.map((i) => {
      const before = particlesOf(column, start.y, i)
      const vapour_per_m3 = start.y[column.layout.vapour + i]
      const box = { temperature_K: COLD_K, vapour_per_m3, closed: true, saturation_Pa: 0 }
      const grown = meanRadius(particlesOf(column, y, i)) - meanRadius(before)
      // 0.2 %: classes of half a nanometre. Saturation is at most 7e-4 of what vapour is left.
      expect(Math.abs(timeToGrow(before, box, grown) / (3600 * hours) - 1)).toBeLessThan(2e-3)
      return y[column.layout.vapour + i] / vapour_per_m3
    })
    // The boxes differ: the lowest has frozen nine tenths of its vapour, the uppermost half.
    expect(leftOver[0]).toBeLessThan(0.12)
    expect(leftOver[3]).toBeGreaterThan(0.4)
  })

  /** How far the column is from populations that are followed one by one. */
  function differences(classes: number): { radius: number; vapour: number }[] {
    const [T, hours] = [142, 6]
    const column = boxes(T, hours, { ...fine(classes), water: uniform('water_ppmv', 3) })
    const start = withParticles(column, 60e6)
    const { y } = finalState(column, start)
    return LEVELS.map((i) => {
      const before = particlesOf(column, start.y, i)
      const vapour_per_m3 = start.y[column.layout.vapour + i]
      const box = { temperature_K: T, vapour_per_m3, closed: true, saturation_Pa: murphyKoop(T) }
      // Steps of 20 s: rates change over an hour, (20/3600)^4 is 1e-9.
      const after = grow(before, box, { time_s: 3600 * hours, step_s: 20 })
      const radii = after.map(({ radius_m }) => radius_m)
      const vapour = y[column.layout.vapour + i] - vapourLeft(before, radii, box)
      return {
        radius: Math.abs(meanRadius(particlesOf(column, y, i)) / meanRadius(after) - 1),
        vapour: Math.abs(vapour / vapour_per_m3),
      }
    })
  }

  it('agrees with an independent integration with Kelvin term, with second order', () => {
    const [coarse, finer] = [differences(40), differences(80)]
    finer.forEach(({ radius, vapour }) => {
      // 0.1 % at classes of about 0.75 nm; the radius grows from 20 nm to 23-57 nm.
      expect(radius).toBeLessThan(1e-3)
      expect(vapour).toBeLessThan(1e-3)
    })
    const worst = (errors: typeof coarse) => Math.max(...errors.map(({ radius }) => radius))
    expect(observedOrder(worst(coarse), worst(finer))).toBeGreaterThan(1.8)
  })
})

describe('sublimation in a fixed environment', () => {
  const T = 150
  const column = (hours: number) =>
    boxes(T, hours, {
      sizes: { smallest_nm: 1, largest_nm: 40, classes: 96, stretching: 1 },
      water: uniform('water_ppmv', 3),
      // No ceiling worth the name, so that the law alone rules.
      numerics: {
        relative_tolerance: 1e-5,
        absolute_tolerance_ice_per_m3: 1e-6,
        sublimation_ceiling_s: 0.01,
      },
    })
  /** So few that their water changes nothing. */
  const FEW_PER_M3 = 1e4

  it('takes radius and water of the particles at the pace of an independent integration', () => {
    const time_s = 1440
    const some = column(time_s / 3600)
    const start = withParticles(some, FEW_PER_M3)
    const { y } = finalState(some, start)
    const left = LEVELS.map((i) => {
      const before = particlesOf(some, start.y, i)
      const vapour_per_m3 = start.y[some.layout.vapour + i]
      const box = { temperature_K: T, vapour_per_m3, closed: false, saturation_Pa: murphyKoop(T) }
      // Steps of a second: the smallest lose 0.05 nm in one.
      const after = grow(before, box, { time_s, step_s: 1 })
      const now = particlesOf(some, y, i)
      for (const power of [1, 3]) {
        const difference = moment(now, power) - moment(after, power)
        // 0.15 % of what there was: classes of 0.3 to 0.6 nm blur the moment at which a particle is gone.
        expect(Math.abs(difference / moment(before, power))).toBeLessThan(1.5e-3)
      }
      return moment(after, 3) / moment(before, 3)
    })
    // From a box that keeps a quarter of its ice to one that keeps a twentieth.
    expect(left[0]).toBeGreaterThan(0.2)
    expect(left[3]).toBeLessThan(0.05)
  })

  it('gives back all vapour and every core when the ice has gone', () => {
    const whole = column(4)
    const start = withParticles(whole, FEW_PER_M3)
    const { y } = finalState(whole, start)
    const [before, after] = [columnTotals(start.y, whole), columnTotals(y, whole)]
    expect(after.ice).toBeLessThan(1e-9 * before.ice)
    // 1e-12: rounding of the sums.
    expect(Math.abs((after.vapour + after.ice) / (before.vapour + before.ice) - 1)).toBeLessThan(
      1e-12,
    )
    before.nuclei.forEach((count, j) => {
      expect(Math.abs(after.nuclei[j] / count - 1)).toBeLessThan(1e-12)
    })
    const { cores, waterAccount } = whole.layout
    const still = y.slice(cores, waterAccount.top)
    // A few times the absolute tolerance of cores, a thousand times that of ice.
    for (const core of still) expect(Math.abs(core)).toBeLessThan(1e-6 * FEW_PER_M3)
  })
})
