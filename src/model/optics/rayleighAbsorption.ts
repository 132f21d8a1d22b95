import { polarisability } from './polarisability.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * Absorption cross-section of a sphere far smaller than the wavelength.
 *
 *   sigma = 4 pi k r^3 Im[(m^2 - 1)/(m^2 + 2)],  k = 2 pi/lambda, m = n + ik
 *
 * @param radius_m radius, m
 * @param wavelength_m wavelength, m
 * @param index refractive index, 1
 * @returns cross-section, m2
 *
 * Source: electrostatic limit of scattering by spheres, textbook. Range: 2 pi r |m|/lambda far below 1.
 */
export function rayleighAbsorption(
  radius_m: number,
  wavelength_m: number,
  index: RefractiveIndex,
): number {
  return ((8 * Math.PI ** 2) / wavelength_m) * radius_m ** 3 * polarisability(index).im
}
