import { BOLTZMANN } from '../constants.ts'
import { moleculeVolume } from './moleculeVolume.ts'
import { surfaceEnergy } from './surfaceEnergy.ts'

/**
 * Kelvin radius of ice: the radius at which curvature raises the vapour pressure by a factor e.
 *
 *   r_K = 2 sigma v_m / (k T)
 *
 * @param temperature_K temperature, K
 * @param density density of ice, kg/m3
 * @returns radius, m (3.7 nm at 150 K, 4.3 nm at 130 K)
 *
 * Source: textbook (Kelvin's law), from memory; sigma as in `surfaceEnergy`. Range: that of sigma. Doubt: a surface
 * energy of bulk ice is stretched to clusters of some hundred molecules.
 */
export function kelvinRadius(temperature_K: number, density: number): number {
  return (2 * surfaceEnergy(temperature_K) * moleculeVolume(density)) / (BOLTZMANN * temperature_K)
}
