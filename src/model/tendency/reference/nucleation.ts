import { centrePoint } from '../../grid.ts'
import { activationRate } from '../../processes/activationRate.ts'
import { amorphousPressureFactor } from '../../processes/amorphousPressureFactor.ts'
import { criticalRadius } from '../../processes/criticalRadius.ts'
import { nucleationRate } from '../../processes/nucleationRate.ts'
import { saturationPressure } from '../../processes/saturationPressure.ts'
import { germEntry } from '../germEntry.ts'
import { type Situation, vapourPressure } from './situation.ts'

/**
 * Free nuclei become ice:
 *   dn_j/dt = -J_j n_j,  dM_j/dt = +J_j n_j,  dN_k/dt = +J_j n_j (share of class k),  vapour pays for their water.
 * J is at most one per ceiling time. The new particle has the larger of the radii of nucleus and critical germ.
 */
export function nucleation(now: Situation, dy: Float64Array): void {
  const { layout, scenario, sizes } = now.column
  if (scenario.nucleation.scheme === 'off') return
  const { nucleusClasses } = scenario.background
  for (let level = 0; level < layout.levels; level++) {
    const conditions = nucleationConditions(now, level)
    const { temperature_K, saturationRatio, density } = conditions
    const germ_m = criticalRadius(temperature_K, saturationRatio, density)
    if (germ_m === Number.POSITIVE_INFINITY) continue
    nucleusClasses.forEach(({ radius_m }, j) => {
      const place = level * layout.nucleusClasses + j
      const born = ratePerNucleus(now, conditions, radius_m) * now.y[layout.nuclei + place]
      const { lowerClass, upperShare } = germEntry(Math.max(radius_m, germ_m), sizes, density)
      const lower = layout.ice + level * sizes.count + lowerClass
      dy[layout.nuclei + place] -= born
      dy[layout.cores + place] += born
      dy[lower] += born * (1 - upperShare)
      dy[lower + 1] += born * upperShare
      dy[layout.vapour + level] -=
        born *
        ((1 - upperShare) * sizes.molecules[lowerClass] +
          upperShare * sizes.molecules[lowerClass + 1])
    })
  }
}

interface LevelConditions {
  temperature_K: number
  vapourPressure_Pa: number
  saturationRatio: number
  density: number
}

function nucleationConditions(now: Situation, level: number): LevelConditions {
  const { ice } = now.column.scenario
  const temperature_K = now.air.temperature_K[centrePoint(level)]
  const vapourPressure_Pa = vapourPressure(now, level)
  const amorphous = ice.amorphousOffset === 'nucleation' || ice.amorphousOffset === 'both'
  const saturated_Pa =
    saturationPressure(ice.saturation, temperature_K) *
    (amorphous ? amorphousPressureFactor(temperature_K) : 1)
  const saturationRatio = vapourPressure_Pa / saturated_Pa
  return { temperature_K, vapourPressure_Pa, saturationRatio, density: ice.density }
}

/** J of one nucleus, below the ceiling, 1/s. */
function ratePerNucleus(
  { column }: Situation,
  level: LevelConditions,
  nucleusRadius_m: number,
): number {
  const { nucleation: parameters, numerics } = column.scenario
  const activationTime_s = numerics.nucleationCeiling_s
  const rate =
    parameters.scheme === 'activation'
      ? activationRate({ ...level, nucleusRadius_m, activationTime_s })
      : nucleationRate({ ...level, nucleusRadius_m, parameters })
  return Math.min(rate, 1 / activationTime_s)
}
