import { impingementRate } from './impingementRate.ts'
import { moleculeVolume } from './moleculeVolume.ts'

export interface GrowthConditions {
  /** Share of the striking molecules that stay, 1. */
  accommodation: number
  /** Density of ice, kg/m3. */
  density: number
  /** Temperature of the air, K. */
  temperature_K: number
  /** Partial pressure of water vapour, Pa. */
  vapourPressure_Pa: number
  /** Vapour pressure in equilibrium with the particle, its curvature, phase and own temperature included, Pa. */
  equilibriumPressure_Pa: number
}

/**
 * Rate at which the radius of an ice sphere grows or, below zero, sublimates.
 *
 *   dr/dt = alpha v_m (e - p_s K_e) / sqrt(2 pi m k T)
 *
 * @returns rate of change of the radius, m/s
 *
 * Source: Hertz-Knudsen law, textbook, from memory. Range: radius far below the mean free path (millimetres at
 * 83 km). Doubts: the accommodation coefficient (Kong et al. 2014, J. Phys. Chem. A: 0.41 +- 0.18 at 200 K);
 * evaporation is taken at the temperature of the air, a particle warmed by a kelvin or so changes it by less than
 * 1 % except through the equilibrium pressure that the caller gives.
 */
export function growthRate(conditions: GrowthConditions): number {
  const excess_Pa = conditions.vapourPressure_Pa - conditions.equilibriumPressure_Pa
  return (
    conditions.accommodation *
    moleculeVolume(conditions.density) *
    impingementRate(excess_Pa, conditions.temperature_K)
  )
}
