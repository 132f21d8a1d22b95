import { centrePoint } from '../../grid.ts'
import { halfVanLeerSlope } from '../../numerics/halfVanLeerSlope.ts'
import { amorphousPressureFactor } from '../../processes/amorphousPressureFactor.ts'
import { growthRate } from '../../processes/growthRate.ts'
import { kelvinFactor } from '../../processes/kelvinFactor.ts'
import { saturationPressure } from '../../processes/saturationPressure.ts'
import { coreMix } from './coreMix.ts'
import { type Situation, vapourPressure } from './situation.ts'

/**
 * Growth and sublimation move ice along the radius at the rate of the class edges:
 *   dN_k/dt = +G_k - G_k+1,  G_k = upward flux through edge k = (dr/dt)/(edge spacing) times a limited upwind value,
 *   dvapour/dt = -sum over edges of G_k (molecules above - molecules below).
 * Nothing grows out of the largest class. What shrinks out of the smallest returns its water and its cores.
 */
export function growth(now: Situation, dy: Float64Array): void {
  const { layout, sizes, scenario } = now.column
  if (!scenario.processes.growth) return
  for (let level = 0; level < layout.levels; level++) {
    const flux = edgeFluxes(now, level)
    for (let k = 0; k < sizes.count; k++) {
      dy[layout.ice + level * sizes.count + k] += flux[k] - flux[k + 1]
      const below = k === 0 ? 0 : sizes.molecules[k - 1]
      dy[layout.vapour + level] -= flux[k] * (sizes.molecules[k] - below)
    }
    coreMix(now, level).forEach((share, j) => {
      const place = level * layout.nucleusClasses + j
      dy[layout.cores + place] += flux[0] * share
      dy[layout.nuclei + place] -= flux[0] * share
    })
  }
}

/** Particles that pass each edge of a level towards larger radii, 1/(m3 s); through the lowest edge only downward. */
function edgeFluxes(now: Situation, level: number): Float64Array {
  const { layout, sizes } = now.column
  const first = layout.ice + level * sizes.count
  const ice = now.y.subarray(first, first + sizes.count)
  const halfSlope = (k: number) =>
    k === 0 || k === sizes.count - 1
      ? 0
      : halfVanLeerSlope(ice[k] - ice[k - 1], ice[k + 1] - ice[k])
  return sizes.edges_m.map((radius_m, k) => {
    const rate = radiusRate(now, level, radius_m) / sizes.edgeSpacing_m[k]
    if (k === sizes.count || (k === 0 && rate > 0)) return 0
    if (rate > 0) return rate * (ice[k - 1] + halfSlope(k - 1))
    return sublimationFlux(
      rate,
      ice[k],
      halfSlope(k),
      now.column.scenario.numerics.sublimationCeiling_s,
    )
  })
}

/**
 * Sublimation passes at most one class per ceiling time; the limited slope fades out between one and two such rates.
 *
 * @param rate of passage, classes per second, negative
 */
function sublimationFlux(rate: number, ice: number, halfSlope: number, ceiling_s: number): number {
  const excess = -rate * ceiling_s
  const slopeLeft = Math.min(1, Math.max(0, 2 - excess))
  return Math.max(rate, -1 / ceiling_s) * (ice - slopeLeft * halfSlope)
}

/** dr/dt of a particle on a class edge, m/s. */
function radiusRate(now: Situation, level: number, radius_m: number): number {
  const { ice } = now.column.scenario
  const temperature_K = now.air.temperature_K[centrePoint(level)]
  const particle_K = temperature_K + ice.particleWarming_K
  const amorphous = ice.amorphousOffset === 'growth' || ice.amorphousOffset === 'both'
  const overPlane_Pa =
    saturationPressure(ice.saturation, particle_K) *
    (amorphous ? amorphousPressureFactor(particle_K) : 1)
  return growthRate({
    temperature_K,
    vapourPressure_Pa: vapourPressure(now, level),
    equilibriumPressure_Pa: overPlane_Pa * kelvinFactor(radius_m, particle_K, ice.density),
    accommodation: ice.accommodation,
    density: ice.density,
  })
}
