import ode45 from 'ode45-cash-karp'
import { describe, expect, it } from 'vitest'
import { type Column, initialSnapshot } from '../../../src/model/simulate.ts'
import { columnTotals } from '../../../src/model/state/columnTotals.ts'
import { makeTendency } from '../../../src/model/tendency/tendency.ts'
import { columnOf, finalState } from '../../support/column.ts'

const HOURS = 3

/** Everything at once on 20 levels and 12 classes: a wave, ice that falls, sublimates and forms, open boundaries. */
function wholeColumn(numerics: object): Column {
  return columnOf({
    grid: { bottom_km: 78, top_km: 94, levels: 20 },
    sizes: { classes: 12 },
    duration_h: HOURS,
    output_every_min: 60 * HOURS,
    waves: [{ amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10, start_h: -5 }],
    initial: {
      ice: [
        {
          altitude_km: 83,
          width_km: 4,
          number_per_cm3: 60,
          median_radius_nm: 35,
          geometric_width: 1.4,
        },
      ],
    },
    numerics,
  })
}

/**
 * The same right-hand side under a solver that is not ours and of another kind: the explicit Runge-Kutta pair of
 * orders five and four of Cash and Karp (1990) as in the npm package ode45-cash-karp.
 */
function solvedOutside(column: Column): Float64Array {
  const { layout } = column
  const tendency = makeTendency(column)
  const end_s = 3600 * HOURS
  tendency.enter(column.atmosphere.basis(0), { from_s: 0, to_s: end_s })
  const integrator = ode45(
    Array.from(initialSnapshot(column).y),
    (dydt, y, t) => tendency.evaluate(t, y, dydt),
    0,
    1,
    {
      tol: 1e-6,
      verbose: false,
      // Per component: its size and a floor, one particle of ice and 1e12 of all else per cubic metre.
      errorScaleFunction: (index, _dt, y) =>
        Math.abs(y) + (index >= layout.ice && index < layout.cores ? 1 : 1e12),
    },
  )
  while (integrator.step(end_s));
  return Float64Array.from(integrator.y)
}

describe('the whole right-hand side under an outside integrator', () => {
  const column = wholeColumn({})
  const { layout, sizes } = column
  const outside = solvedOutside(column)
  const parts = {
    vapour: [layout.vapour, layout.nuclei],
    nuclei: [layout.nuclei, layout.ice],
    ice: [layout.ice, layout.cores],
    cores: [layout.cores, layout.waterAccount.top],
    accounts: [layout.waterAccount.top, layout.length],
  }

  /** Largest difference of a part of the state from the outside solution, over the largest value of that part. */
  function difference(y: Float64Array, [from, to]: number[]): number {
    let [worst, size] = [0, 0]
    for (let index = from; index < to; index++) {
      worst = Math.max(worst, Math.abs(y[index] - outside[index]))
      size = Math.max(size, Math.abs(outside[index]))
    }
    return worst / size
  }

  /** Rayleigh light of the column but for a factor, sum of N r^6. */
  const light = (y: Float64Array) =>
    y
      .subarray(layout.ice, layout.cores)
      .reduce((sum, N, cell) => sum + N * sizes.radii_m[cell % layout.classes] ** 6, 0)

  it('has something to solve: ice forms, falls out and sublimates', () => {
    const start = initialSnapshot(column).y
    const particles = (y: Float64Array) =>
      y.subarray(layout.ice, layout.cores).reduce((sum, N) => sum + N, 0)
    expect(particles(outside)).toBeGreaterThan(1.5 * particles(start))
    expect(Math.abs(light(outside) / light(start) - 1)).toBeGreaterThan(0.1)
  })

  it('is solved alike at tight tolerances', () => {
    const { y } = finalState(
      wholeColumn({
        relative_tolerance: 1e-5,
        absolute_tolerance_ice_per_m3: 0.01,
        absolute_tolerance_vapour_per_m3: 1e7,
      }),
    )
    for (const [name, part] of Object.entries(parts)) {
      // A few times the tolerances of both solvers, 1e-6 and 1e-5.
      expect(difference(y, part), name).toBeLessThan(2e-5)
    }
    expect(Math.abs(light(y) / light(outside) - 1)).toBeLessThan(1e-6)
  })

  it('is solved at the default tolerances well within 0.1 %', () => {
    const { y } = finalState(wholeColumn({}))
    for (const [name, part] of Object.entries(parts)) {
      expect(difference(y, part), name).toBeLessThan(5e-4)
    }
    // Brightness and the mass of ice are what the tolerances are chosen for.
    expect(Math.abs(light(y) / light(outside) - 1)).toBeLessThan(1e-4)
    const ice = columnTotals(y, column).ice / columnTotals(outside, column).ice
    expect(Math.abs(ice - 1)).toBeLessThan(1e-4)
  })
})
