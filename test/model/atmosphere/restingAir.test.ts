import { describe, expect, it } from 'vitest'
import {
  AIR_MOLECULE_MASS,
  BOLTZMANN,
  EARTH_RADIUS,
  STANDARD_GRAVITY,
} from '../../../src/model/constants.ts'
import { facePoint } from '../../../src/model/grid.ts'
import { readHermite } from '../../../src/model/numerics/hermite.ts'
import { columnOf, uniform } from '../../support/column.ts'

/**
 * U.S. Standard Atmosphere 1976: altitude (km), temperature (K), pressure (Pa). Up to 85 km from its equations 23, 33
 * and 42 (the kinetic temperature is up to 0.04 % lower at 80-85 km); from 86 km on the pressure of Table I, read in
 * a public copy, and the temperature of equations 25 and 27.
 */
const STANDARD_ATMOSPHERE = [
  [80, 198.639, 1.05247],
  [81, 196.688, 0.889231],
  [82, 194.739, 0.750088],
  [83, 192.79, 0.631668],
  [84, 190.841, 0.531045],
  [85, 188.893, 0.445681],
  [86, 186.87, 0.37338],
  [87, 186.87, 0.31259],
  [88, 186.87, 0.26173],
  [89, 186.87, 0.21919],
  [90, 186.87, 0.18359],
  [91, 186.87, 0.15381],
  [92, 186.96, 0.12887],
  [93, 187.25, 0.10801],
  [94, 187.74, 0.09056],
  [95, 188.42, 0.075966],
] as const

/**
 * CIRA-86 (COSPAR; Barnett 1990, corrected 2007), July, 70 N, read from a public copy of the data set and interpolated
 * to geometric kilometres: altitude (km), temperature (K), pressure (Pa).
 */
const POLAR_JULY = [
  [70, 222.07, 7.92617],
  [71, 217.33, 6.80604],
  [72, 212.51, 5.83289],
  [73, 207.4, 4.97338],
  [74, 202.22, 4.22549],
  [75, 196.96, 3.57764],
  [76, 191.57, 3.00993],
  [77, 186.06, 2.5227],
  [78, 180.47, 2.10539],
  [79, 174.94, 1.74618],
  [80, 169.71, 1.43791],
  [81, 164.7, 1.17727],
  [82, 159.82, 0.958426],
  [83, 155, 0.775885],
  [84, 150.55, 0.623876],
  [85, 146.72, 0.497062],
  [86, 143.73, 0.393947],
  [87, 142.04, 0.311294],
  [88, 141.48, 0.245697],
  [89, 141.73, 0.194082],
  [90, 142.85, 0.153649],
  [91, 144.85, 0.122023],
  [92, 147.7, 0.0973313],
  [93, 151.36, 0.0780538],
  [94, 155.71, 0.0629707],
  [95, 160.87, 0.0511544],
  [96, 167.14, 0.0419327],
  [97, 174.22, 0.0346547],
  [98, 181.96, 0.0288574],
  [99, 190.28, 0.0241957],
  [100, 199.6, 0.0205464],
] as const

/**
 * By how much the layers of this table, from 70-71 km upward, miss hydrostatic balance with a temperature linear in
 * altitude; computed independently from ln(p1/p2) = m g dz ln(T2/T1)/(k (T2 - T1)), M = 28.9644 g/mol.
 */
const OWN_IMBALANCE = [
  -0.00164, 0.00744, -0.00213, 0.00033, 0.0048, -0.00593, 0.00045, 0.00626, 0.00282, -0.00436,
  -0.0037, -0.00194, 0.0011, -0.00085, -0.01484, -0.01485, -0.01172, -0.00908, -0.00486, -0.00059,
  0.00178, 0.00393, 0.00566, 0.00647, 0.00839, 0.01722, 0.01894, 0.0166, 0.01039, 0.03933,
]

type Atmosphere = readonly (readonly [number, number, number])[]

/** Resting pressure of the model at whole kilometres, hung on the lowest pressure of a table. */
function pressuresFrom(table: Atmosphere): Map<number, number> {
  const [bottom_km, , pressure_Pa] = table[0]
  const top_km = table[table.length - 1][0]
  const { grid, atmosphere } = columnOf({
    grid: { bottom_km, top_km, levels: top_km - bottom_km },
    pressure: { altitude_km: bottom_km, pressure_Pa },
    temperature: {
      table: { altitude_km: table.map(([z]) => z), temperature_K: table.map(([, T]) => T) },
    },
  })
  const { rest } = atmosphere.basis(0)
  return new Map(
    Array.from(grid.faces_m, (z, f) => [Math.round(z / 1000), rest.pressure_Pa[facePoint(f)]]),
  )
}

describe('restingAir', () => {
  it('finds the pressures of the U.S. Standard Atmosphere 1976 from its temperatures', () => {
    const pressures = pressuresFrom(STANDARD_ATMOSPHERE)
    for (const [z, , pressure_Pa] of STANDARD_ATMOSPHERE) {
      // 1 %: above 86 km the molar mass of the standard falls, by 0.8 % at 95 km; here it is constant.
      expect(Math.abs((pressures.get(z) ?? 0) / pressure_Pa - 1), `${z} km`).toBeLessThan(0.01)
    }
  })

  it('finds the layers of CIRA-86 as thick as that climatology is in balance with itself', () => {
    const pressures = pressuresFrom(POLAR_JULY)
    const layer = (above: number, below: number) => Math.log(below / above)
    POLAR_JULY.slice(1).forEach(([top, , above_Pa], i) => {
      const [bottom, , below_Pa] = POLAR_JULY[i]
      const computed = layer(pressures.get(top) ?? 0, pressures.get(bottom) ?? 0)
      const imbalance = computed / layer(above_Pa, below_Pa) - 1
      // 0.0015: the curvature of the temperature inside a layer, which the straight line leaves out.
      expect(Math.abs(imbalance - OWN_IMBALANCE[i]), `${bottom} km`).toBeLessThan(0.0015)
    })
  })

  it('follows the closed form of isothermal air under falling gravity', () => {
    const temperature_K = 140
    const { grid, atmosphere } = columnOf({
      pressure: { altitude_km: 85, pressure_Pa: 0.4 },
      temperature: uniform('temperature_K', temperature_K),
    })
    const { rest } = atmosphere.basis(0)
    const perInverseRadius =
      (AIR_MOLECULE_MASS * STANDARD_GRAVITY * EARTH_RADIUS ** 2) / (BOLTZMANN * temperature_K)
    grid.halfPoints_m.forEach((z, i) => {
      const exponent = perInverseRadius * (1 / (EARTH_RADIUS + z) - 1 / (EARTH_RADIUS + 85e3))
      // 1e-11: five-point Gauss quadrature of a smooth integrand, sums of a few hundred terms.
      expect(rest.pressure_Pa[i] / (0.4 * Math.exp(exponent)) - 1).toBeCloseTo(0, 11)
    })
  })

  it('holds the reference pressure at its exact altitude on any grid', () => {
    const altitude_km = 83.217
    const at = (levels: number) => {
      const { atmosphere } = columnOf({
        grid: { levels },
        pressure: { altitude_km, pressure_Pa: 0.75 },
      })
      const { logPressure } = atmosphere.basis(0).rest
      return [83.217, 80, 90].map((z) => Math.exp(readHermite(logPressure, z * 1000)))
    }
    const fine = at(400)
    // 5e-9: the table of ln p between nodes 24 m apart.
    expect(fine[0] / 0.75 - 1).toBeCloseTo(0, 8)
    for (const levels of [13, 20, 60, 128]) {
      // 1e-5: the table between nodes on cells of 1.5 km; holding it at the nearest cell would miss by up to 15 %.
      at(levels).forEach((pressure, i) => {
        expect(Math.abs(pressure / fine[i] - 1), `${levels} levels`).toBeLessThan(1e-5)
      })
    }
  })
})
