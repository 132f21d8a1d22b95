import { AIR_MOLECULE_MASS, BOLTZMANN } from '../constants.ts'

/**
 * Mean speed of the molecules of air.
 *
 *   vbar = sqrt(8 k T / (pi m_air))
 *
 * @param temperature_K temperature, K
 * @returns speed, m/s
 *
 * Source: kinetic theory of gases, textbook. Range: as for `airDensity`.
 */
export function meanMolecularSpeed(temperature_K: number): number {
  return Math.sqrt((8 * BOLTZMANN * temperature_K) / (Math.PI * AIR_MOLECULE_MASS))
}
