import { WATER_MOLECULE_MASS } from '../constants.ts'

/**
 * Volume that one water molecule takes up in ice.
 *
 *   v_m = m / rho
 *
 * @param density density of ice, kg/m3
 * @returns volume, m3
 *
 * Source: definition. Range: any positive density.
 */
export function moleculeVolume(density: number): number {
  return WATER_MOLECULE_MASS / density
}
