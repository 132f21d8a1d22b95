import { BOLTZMANN, WATER_MOLECULE_MASS } from '../constants.ts'

/**
 * Water molecules that strike unit area of a surface in unit time.
 *
 *   beta = e / sqrt(2 pi m k T)
 *
 * @param vapourPressure_Pa partial pressure of water vapour, Pa; a pressure difference gives the net flux
 * @param temperature_K temperature of the vapour, K
 * @returns molecules per area and time, 1/(m2 s)
 *
 * Source: kinetic theory of gases (Hertz and Knudsen), textbook, from memory. Range: particles small against the
 * mean free path.
 */
export function impingementRate(vapourPressure_Pa: number, temperature_K: number): number {
  return (
    vapourPressure_Pa / Math.sqrt(2 * Math.PI * WATER_MOLECULE_MASS * BOLTZMANN * temperature_K)
  )
}
