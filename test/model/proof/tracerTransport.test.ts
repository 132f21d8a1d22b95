import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { centrePoint } from '../../../src/model/grid.ts'
import type { Scenario } from '../../../src/model/scenario/types.ts'
import { type Column, initialSnapshot } from '../../../src/model/simulate.ts'
import { columnTotals } from '../../../src/model/state/columnTotals.ts'
import { makeTendency } from '../../../src/model/tendency/tendency.ts'
import { columnOf, finalState, NO_PROCESSES, sampled, uniform } from '../../support/column.ts'
import { EXPONENTIAL_AIR, MIDDLE_M, SCALE_HEIGHT_M } from '../../support/exponentialAir.ts'
import { meanError, observedOrder } from '../../support/order.ts'

/** Air without ice; one class of nuclei is the tracer. Numbers invented. */
const AIR = {
  ...EXPONENTIAL_AIR,
  nuclei: { ...uniform('nuclei_per_cm3', 1000), classes: [{ radius_nm: 1, share: 1 }] },
  photolysis: { enabled: false },
  nucleation: { scheme: 'off' },
  processes: { ...NO_PROCESSES, wind: true, diffusion: true },
  // Tight, so that the spatial error shows.
  numerics: { relative_tolerance: 1e-6 },
}

/** Number of air molecules at the middle altitude over the density of the exponential air, exp((z - z0)/H). */
const thinning = (z: number) => Math.exp((z - MIDDLE_M) / SCALE_HEIGHT_M)

/** The column whose background, inside and outside, has a given mixing ratio of nuclei. */
function withTracer(
  document: object,
  mixingRatio: (altitude_m: number) => number,
  change: (scenario: Scenario, points_m: Float64Array) => Scenario = (scenario) => scenario,
): Column {
  const { grid, atmosphere } = columnOf(document)
  const { density_per_m3 } = atmosphere.basis(0).rest
  const points_m = grid.halfPoints_m
  const nuclei_per_m3 = sampled(
    points_m,
    (z) => density_per_m3[points_m.indexOf(z)] * mixingRatio(z),
  )
  return columnOf(document, (scenario) => ({
    ...change(scenario, points_m),
    background: { ...change(scenario, points_m).background, nuclei_per_m3 },
  }))
}

function tracerOf({ layout, atmosphere }: Column, y: Float64Array): number[] {
  const { density_per_m3 } = atmosphere.basis(0).rest
  return Array.from(
    { length: layout.levels },
    (_, i) => y[layout.nuclei + i] / density_per_m3[centrePoint(i)],
  )
}

describe('the steady balance of wind and diffusion', () => {
  /**
   * A wind of constant mass flux, w = w0 exp((z - z0)/H), and a diffusivity K: q = A + B exp(integral w/K dz) with
   * integral w/K dz = (w0 H/K) exp((z - z0)/H), for any A and B.
   */
  const [w0, K] = [0.02, 60]
  const exact = (z: number) => 1e-12 * (1 + Math.exp(((w0 * SCALE_HEIGHT_M) / K) * thinning(z)))

  function relaxed(levels: number): { computed: number[]; wanted: number[] } {
    const document = {
      ...AIR,
      grid: { bottom_km: 80, top_km: 88, levels },
      mixing: uniform('mixing_m2_per_s', K),
      // Ten times the slowest decay time, L^2/(pi^2 K) = 30 h: what is left is below 1e-4.
      duration_h: 300,
      output_every_min: 18_000,
    }
    const column = withTracer(document, exact, (scenario, points_m) => ({
      ...scenario,
      background: {
        ...scenario.background,
        wind_m_per_s: sampled(points_m, (z) => w0 * thinning(z)),
      },
    }))
    const start = initialSnapshot(column)
    for (let i = 0; i < levels; i++) start.y[column.layout.nuclei + i] *= i % 2 === 0 ? 0.2 : 1.5
    return {
      computed: tracerOf(column, finalState(column, start).y),
      wanted: Array.from(column.grid.centres_m, exact),
    }
  }

  it('is reached from anywhere, q = A + B exp(integral w/K), with second order', () => {
    const errors = [8, 16, 32].map((levels) => {
      const { computed, wanted } = relaxed(levels)
      return meanError(computed, wanted)
    })
    // q rises 18-fold over the column, by a third from cell to cell near its top: 1 % at 32 levels.
    expect(errors[2]).toBeLessThan(0.01)
    expect(observedOrder(errors[0], errors[1])).toBeGreaterThan(1.8)
    expect(observedOrder(errors[1], errors[2])).toBeGreaterThan(1.8)
  })
})

describe('a spreading Gaussian', () => {
  /**
   * With n0 ~ exp(-z/H), q_t + w q_z = K (q_zz - q_z/H): a Gaussian spreads by sigma^2 = sigma0^2 + 2 K t, rises with
   * w + K/H and sinks in height as sigma0/sigma.
   */
  const [K, start_m, sigma0_m, time_s] = [50, 84e3, 1000, 6 * 3600]
  const variance = sigma0_m ** 2 + 2 * K * time_s
  const gaussian = (z: number, middle_m: number, spread_m2: number) =>
    ((1e-12 * sigma0_m) / Math.sqrt(spread_m2)) * Math.exp(-((z - middle_m) ** 2) / (2 * spread_m2))

  function errorAt(levels: number, w: number): number {
    const centre_m = start_m + (w + K / SCALE_HEIGHT_M) * time_s
    const column = withTracer(
      {
        ...AIR,
        grid: { bottom_km: 76, top_km: 94, levels },
        mixing: uniform('mixing_m2_per_s', K),
        wind: uniform('wind_cm_per_s', 100 * w),
        duration_h: time_s / 3600,
        output_every_min: time_s / 60,
      },
      (z) => gaussian(z, start_m, sigma0_m ** 2),
    )
    const exact = Array.from(column.grid.centres_m, (z) => gaussian(z, centre_m, variance))
    return meanError(tracerOf(column, finalState(column).y), exact)
  }

  it('spreads, drifts and sinks as its closed form says, with second order', () => {
    const errors = [24, 48, 96].map((levels) => errorAt(levels, 0))
    // A thousandth at cells of 190 m, a fifth of the first standard deviation.
    expect(errors[2]).toBeLessThan(1e-3)
    for (const order of [
      observedOrder(errors[0], errors[1]),
      observedOrder(errors[1], errors[2]),
    ]) {
      // Central differences: two, and a tenth for grids this coarse.
      expect(order).toBeGreaterThan(1.9)
      expect(order).toBeLessThan(2.1)
    }
  })

  it('is carried by the mean wind besides', () => {
    const errors = [48, 96].map((levels) => errorAt(levels, 0.03))
    // The peak moves by 650 m; carrying it by first-order upwinding would miss by several per cent.
    expect(errors[1]).toBeLessThan(1e-3)
    // The limiter flattens the very peak, so that wind and diffusion together fall a little short of second order.
    expect(observedOrder(errors[0], errors[1])).toBeGreaterThan(1.5)
  })
})

describe('a constant mixing ratio', () => {
  const number = (min: number, max: number) => fc.double({ min, max, noNaN: true })
  const windKnots = (w: number[]) =>
    w.map((wind_cm_per_s, i) => ({ altitude_km: 76 + 3 * i, wind_cm_per_s }))
  const wind = fc.array(number(-400, 400), { minLength: 8, maxLength: 8 })

  /** An open column with a wind that changes in time, a wave, and the same mixing ratios everywhere. */
  function constantColumn(earlier: number[], later: number[]): Column {
    const duration_h = 24
    return withTracer(
      {
        ...AIR,
        temperature: {},
        grid: { levels: 24 },
        duration_h,
        // Nothing changes, so nothing but the outputs keeps the steps of the solver in its stable range.
        output_every_min: 1,
        water: uniform('water_ppmv', 3),
        wind: {
          series: [earlier, later].map((knots, i) => ({
            time_h: i * duration_h,
            knots: windKnots(knots),
          })),
        },
        waves: [{ amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10 }],
      },
      () => 1e-12,
    )
  }

  it('is stationary to rounding for any wind w(z, t), with diffusion and under a wave', () => {
    fc.assert(
      fc.property(wind, wind, number(0, 86_400), (earlier, later, time_s) => {
        const column = constantColumn(earlier, later)
        const { atmosphere, layout, grid } = column
        const tendency = makeTendency(column)
        const basis = atmosphere.basis(0)
        const interval = { from_s: 0, to_s: 86_400 }
        tendency.enter(basis, interval)
        const { y } = initialSnapshot(column)
        const dy = new Array<number>(layout.length).fill(0)
        tendency.evaluate(time_s, y, dy)
        const air = atmosphere.read(basis, time_s, interval)
        for (let i = 0; i < layout.levels; i++) {
          const point = centrePoint(i)
          const passing =
            (Math.abs(air.wind_m_per_s[point]) + 4) / grid.spacing_m +
            (air.mixing_m2_per_s[point] * 20) / grid.spacing_m ** 2
          // Rounding: a few 1e-16 of each flux, of which the largest at a neighbouring face is bounded by the 4 m/s
          // of any wind here and by twenty times the local diffusivity.
          const bound = 1e-14 * passing
          expect(Math.abs(dy[layout.vapour + i] / y[layout.vapour + i])).toBeLessThan(bound)
          expect(Math.abs(dy[layout.nuclei + i] / y[layout.nuclei + i])).toBeLessThan(bound)
        }
      }),
      { seed: 1906, numRuns: 50 },
    )
  })

  it('stays constant to 1e-12 through a day of winds that blow in and out of the column', () => {
    const column = constantColumn(
      [3, -4, 2, 5, -3, 4, -2, 3].map((w) => 100 * w),
      [-3, 2, 5, -1, 4, -4, 2, -5].map((w) => 100 * w),
    )
    const { density_per_m3 } = column.atmosphere.basis(0).rest
    const { y } = finalState(column)
    for (let i = 0; i < column.layout.levels; i++) {
      const density = density_per_m3[centrePoint(i)]
      // 1e-12: some thousand steps of 1e-15 each.
      expect(Math.abs(y[column.layout.vapour + i] / density / 3e-6 - 1)).toBeLessThan(1e-12)
      expect(Math.abs(y[column.layout.nuclei + i] / density / 1e-12 - 1)).toBeLessThan(1e-12)
    }
    // The wind did carry water: what the sides took or gave is of the order of the column itself.
    const lateral = Math.abs(y[column.layout.waterAccount.lateral])
    expect(lateral).toBeGreaterThan(0.1 * columnTotals(y, column).vapour)
  })
})
