import { airDensity } from './airDensity.ts'
import { meanMolecularSpeed } from './meanMolecularSpeed.ts'
import { viscosity } from './viscosity.ts'

/** Ratio mu/(rho vbar lambda) for hard spheres; kinetic theory of gases, textbook. */
export const VISCOSITY_FACTOR = 0.499

/**
 * Mean free path of air, the one that belongs to its viscosity.
 *
 *   lambda = mu / (0.499 rho vbar)
 *
 * @param temperature_K temperature, K
 * @param pressure_Pa pressure, Pa
 * @returns mean free path, m (3.4 mm at 150 K, 0.8 Pa)
 *
 * Source: kinetic theory of gases, textbook. Range: that of `viscosity`. The hard-sphere mean free path of the U.S.
 * Standard Atmosphere 1976 (3.65e-10 m) is about 30 % longer at 150 K: with this viscosity it would make slip
 * corrections, and so fall speeds, 30 % too large.
 */
export function meanFreePath(temperature_K: number, pressure_Pa: number): number {
  const density = airDensity(temperature_K, pressure_Pa)
  return viscosity(temperature_K) / (VISCOSITY_FACTOR * density * meanMolecularSpeed(temperature_K))
}
