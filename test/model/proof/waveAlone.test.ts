import { describe, expect, it } from 'vitest'
import {
  AIR_HEAT_CAPACITY,
  AIR_MOLECULE_MASS,
  BOLTZMANN,
  EARTH_RADIUS,
  STANDARD_GRAVITY,
} from '../../../src/model/constants.ts'
import { diagnose } from '../../../src/model/diagnostics/diagnose.ts'
import { centrePoint } from '../../../src/model/grid.ts'
import { rayleighCrossSection } from '../../../src/model/optics/rayleighCrossSection.ts'
import { gravity } from '../../../src/model/processes/gravity.ts'
import type { Column, Snapshot } from '../../../src/model/simulate.ts'
import { columnOf, finalState, NO_PROCESSES, statesOf, uniform } from '../../support/column.ts'

const TEMPERATURE_K = 150
const WAVE = {
  amplitude_K: 5,
  period_h: 1,
  vertical_wavelength_km: 10,
  at_km: 85,
  grows: false,
  start_h: -10,
}

/** Isothermal air with a wave, and nothing that could change a mixing ratio but the wave itself. */
const WAVY_AIR = {
  pressure: { altitude_km: 84, pressure_Pa: 0.6 },
  temperature: uniform('temperature_K', TEMPERATURE_K),
  nucleation: { scheme: 'off' },
  photolysis: { enabled: false },
  waves: [WAVE],
}

const ICE = [
  {
    altitude_km: 83,
    width_km: 1.2,
    number_per_cm3: 80,
    median_radius_nm: 45,
    geometric_width: 1.3,
  },
]

describe('a wave alone', () => {
  const tenDays = {
    ...WAVY_AIR,
    grid: { levels: 40 },
    sizes: { classes: 12 },
    duration_h: 240,
    output_every_min: 14_400,
  }

  /** Largest relative change of any mixing ratio; number densities of resting air are mixing ratios times n0. */
  function largestChange(column: Column): number {
    const states = statesOf(column)
    const [start, end] = [states[0], states[states.length - 1]]
    let largest = 0
    for (let index = 0; index < column.layout.waterAccount.top; index++) {
      if (start.y[index] === 0) expect(end.y[index]).toBe(0)
      else largest = Math.max(largest, Math.abs(end.y[index] / start.y[index] - 1))
    }
    return largest
  }

  it('leaves every tracer as it was after ten days without ice, fall and diffusion', () => {
    const column = columnOf({
      ...tenDays,
      wind: { factor: 0 },
      processes: { growth: true, sedimentation: true, wind: true, diffusion: false },
    })
    expect(largestChange(column)).toBeLessThan(1e-12)
  })

  it('leaves passive ice and its cores as they were after ten days', () => {
    const column = columnOf({ ...tenDays, processes: NO_PROCESSES, initial: { ice: ICE } })
    expect(largestChange(column)).toBeLessThan(1e-12)
  })

  it('does act on ice that falls: the layer is not where it would be without the wave', () => {
    const falling = (waves: object[]) =>
      finalState(
        columnOf({
          ...tenDays,
          duration_h: 1.5,
          output_every_min: 90,
          processes: { ...NO_PROCESSES, sedimentation: true },
          initial: { ice: ICE },
          waves,
        }),
      )
    expect(falling([WAVE]).y).not.toEqual(falling([]).y)
  })
})

describe('passive ice under a wave', () => {
  const column = columnOf({
    ...WAVY_AIR,
    grid: { levels: 190 },
    sizes: { classes: 12 },
    processes: NO_PROCESSES,
    initial: { ice: ICE },
    duration_h: 1,
    output_every_min: 10,
  })
  const states = statesOf(column)
  const basis = column.atmosphere.basis(0)

  /** Brightness in the second channel, 532 nm backscatter, of one level alone. */
  function brightnessOfLevel(level: number, { y, time_s, basisTime_s }: Snapshot): number {
    const { layout } = column
    const alone = new Float64Array(y.length)
    const row = layout.ice + level * layout.classes
    alone.set(y.subarray(row, row + layout.classes), row)
    return diagnose(column, { y: alone, time_s, basisTime_s }).brightness.albedo_per_sr[1] as number
  }

  /** The same without a wave: sum of N0 d sigma/d Omega dz0. */
  function brightnessAtRest(level: number, { y }: Snapshot): number {
    const { layout, sizes, grid, scenario } = column
    const { wavelength_m, refractiveIndex } = scenario.channels[1]
    let sum = 0
    sizes.radii_m.forEach((radius_m, k) => {
      const N = y[layout.ice + level * layout.classes + k]
      sum += N * rayleighCrossSection(radius_m, wavelength_m, refractiveIndex, Math.PI)
    })
    return sum * grid.spacing_m
  }

  /**
   * (n/n0)(1 + Z) from the closed form of isothermal air: zeta = -T' cp/g, T = T0 - (g/cp) zeta, p = p0(z + zeta).
   */
  function convergence(z: number, time_s: number): number {
    const displacement = (at: number) => {
      const phase = 2 * Math.PI * (time_s / 3600 + (at - 85e3) / 10e3)
      return (-5 * Math.cos(phase) * AIR_HEAT_CAPACITY) / gravity(at)
    }
    const shift = displacement(z)
    const depth =
      ((AIR_MOLECULE_MASS * STANDARD_GRAVITY * EARTH_RADIUS ** 2) / (BOLTZMANN * TEMPERATURE_K)) *
      (1 / (EARTH_RADIUS + z + shift) - 1 / (EARTH_RADIUS + z))
    const T = TEMPERATURE_K - (gravity(z) / AIR_HEAT_CAPACITY) * shift
    const stretching = (displacement(z + 1) - displacement(z - 1)) / 2
    return Math.exp(depth) * (TEMPERATURE_K / T) * (1 + stretching)
  }

  const levels = [55, 60, 65]

  it('keeps its numbers to the last bit', () => {
    for (const { y } of states) expect(y).toEqual(states[0].y)
  })

  it('brightens and dims by exactly (n/n0)(1 + Z)', () => {
    for (const state of states) {
      const air = column.atmosphere.read(basis, state.time_s, { from_s: 0, to_s: 3600 })
      const factor = levels.map((i) => {
        const point = centrePoint(i)
        return air.densityRatio[point] * (1 + air.stretching[point])
      })
      levels.forEach((i, place) => {
        const ratio = brightnessOfLevel(i, state) / brightnessAtRest(i, state)
        // 1e-12: rounding of sums over twelve classes.
        expect(Math.abs(ratio / factor[place] - 1)).toBeLessThan(1e-12)
      })
    }
  })

  it('does so by the convergence of the air that the closed form gives', () => {
    const seen: number[] = []
    for (const state of states) {
      for (const i of levels) {
        const expected = convergence(column.grid.centres_m[i], state.time_s)
        const ratio = brightnessOfLevel(i, state) / brightnessAtRest(i, state)
        // 0.05 %: the stretching over a cell of 100 m, (2 pi 100/10000)^2/24 of Z up to 0.33.
        expect(Math.abs(ratio / expected - 1)).toBeLessThan(5e-4)
        seen.push(ratio)
      }
    }
    // The wave is felt: by a third either way.
    expect(Math.max(...seen) / Math.min(...seen)).toBeGreaterThan(1.5)
  })
})
