import { gansPolarisability } from './gansPolarisability.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/** Cross-sections in m2. */
export interface GansCrossSections {
  scattering: number
  absorption: number
  /** Scattering + absorption. */
  extinction: number
}

/**
 * Scattering, absorption and extinction of randomly oriented spheroids far smaller than the wavelength.
 *
 *   sigma_sca = (8 pi/3) k^4 r^6 (A + 2 G/9),  sigma_abs = 4 pi k r^3 Im (alpha_along + 2 alpha_across)/3,  k = 2 pi/lambda
 *   A = |(alpha_along + 2 alpha_across)/3|^2,  G = |alpha_along - alpha_across|^2
 *
 * @param radius_m radius r of the sphere of equal volume, m
 * @param wavelength_m wavelength, m
 * @param index refractive index, 1
 * @param axisRatio length along the axis of symmetry over width across it, above 0
 * @returns cross-sections, m2
 *
 * Source: Gans 1912, Ann. Phys. 37, 881, from memory. Range: every axis times |m| far below the wavelength/2 pi.
 */
export function gansCrossSections(
  radius_m: number,
  wavelength_m: number,
  index: RefractiveIndex,
  axisRatio: number,
): GansCrossSections {
  const { meanIm, meanSquare, anisotropySquare } = gansPolarisability(index, axisRatio)
  const waveNumber = (2 * Math.PI) / wavelength_m
  const scattering =
    ((8 * Math.PI) / 3) *
    waveNumber ** 4 *
    radius_m ** 6 *
    (meanSquare + (2 / 9) * anisotropySquare)
  const absorption = 4 * Math.PI * waveNumber * radius_m ** 3 * meanIm
  return { scattering, absorption, extinction: scattering + absorption }
}
