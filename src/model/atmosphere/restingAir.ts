import { AIR_HEAT_CAPACITY, AIR_MOLECULE_MASS, BOLTZMANN } from '../constants.ts'
import type { AltitudeGrid } from '../grid.ts'
import { type HermiteTable, readHermite } from '../numerics/hermite.ts'
import type { Curve } from '../numerics/monotoneCubic.ts'
import { gravity } from '../processes/gravity.ts'

/** The wave-free air in hydrostatic balance, on the half points of the grid. */
export interface RestingAir {
  temperature_K: Float64Array
  pressure_Pa: Float64Array
  /** Air number density n0 = p0/(k T0), 1/m3. */
  density_per_m3: Float64Array
  gravity_m_per_s2: Float64Array
  /** dT0/dz, K/m. */
  lapse_K_per_m: Float64Array
  /** Static stability dT0/dz + g/cp, K/m. */
  stability_K_per_m: Float64Array
  /** ln(p0 / Pa) against altitude, reaching beyond the column by the largest displacement. */
  logPressure: HermiteTable
}

/** How far beyond the column the pressure is known, for displaced air; m. */
const MARGIN = 6000

/** Nodes and weights of the five-point Gauss-Legendre rule on [-1, 1]; standard tables. */
const GAUSS = [
  [0, 0.5688888888888889],
  [-0.5384693101056831, 0.47862867049936647],
  [0.5384693101056831, 0.47862867049936647],
  [-0.906179845938664, 0.23692688505618908],
  [0.906179845938664, 0.23692688505618908],
] as const

/**
 * Hydrostatic balance d(ln p)/dz = -m g/(k T0), integrated from one reference pressure at its exact altitude.
 * The mean molecular mass of air is constant; above 86 km the real one falls (0.8 % by 95 km).
 *
 * @param temperature T0 against altitude, K
 */
export function restingAir(
  temperature: Curve,
  reference: { altitude_m: number; pressure_Pa: number },
  grid: AltitudeGrid,
): RestingAir {
  const logPressure = hydrostaticTable(temperature, reference, grid)
  const z = grid.halfPoints_m
  const temperature_K = z.map((at) => temperature.value(at))
  const pressure_Pa = z.map((at) => Math.exp(readHermite(logPressure, at)))
  return {
    temperature_K,
    pressure_Pa,
    density_per_m3: pressure_Pa.map((p, i) => p / (BOLTZMANN * temperature_K[i])),
    gravity_m_per_s2: z.map(gravity),
    lapse_K_per_m: z.map((at) => temperature.slope(at)),
    stability_K_per_m: z.map((at) => temperature.slope(at) + gravity(at) / AIR_HEAT_CAPACITY),
    logPressure,
  }
}

function hydrostaticTable(
  temperature: Curve,
  reference: { altitude_m: number; pressure_Pa: number },
  grid: AltitudeGrid,
): HermiteTable {
  const slope = (z: number) =>
    (-AIR_MOLECULE_MASS * gravity(z)) / (BOLTZMANN * temperature.value(z))
  const spacing = grid.spacing_m / 2
  const marginNodes = Math.ceil(MARGIN / spacing)
  const start = grid.halfPoints_m[0] - marginNodes * spacing
  const count = grid.halfPoints_m.length + 2 * marginNodes
  const values = new Float64Array(count)
  values[0] = Math.log(reference.pressure_Pa) + integrateFinely(slope, reference.altitude_m, start)
  for (let i = 1; i < count; i++) {
    const from = start + (i - 1) * spacing
    values[i] = values[i - 1] + integrate(slope, from, from + spacing)
  }
  return { start, spacing, values, slopes: values.map((_, i) => slope(start + i * spacing)) }
}

function integrate(f: (x: number) => number, from: number, to: number): number {
  const half = (to - from) / 2
  let sum = 0
  for (const [node, weight] of GAUSS) sum += weight * f(from + half * (1 + node))
  return half * sum
}

function integrateFinely(f: (x: number) => number, from: number, to: number): number {
  const pieces = Math.max(1, Math.ceil(Math.abs(to - from) / 100))
  const step = (to - from) / pieces
  let sum = 0
  for (let i = 0; i < pieces; i++) sum += integrate(f, from + i * step, from + (i + 1) * step)
  return sum
}
