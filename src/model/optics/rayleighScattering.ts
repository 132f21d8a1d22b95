import { polarisability } from './polarisability.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * Total scattering cross-section of a sphere far smaller than the wavelength.
 *
 *   sigma = (8 pi/3) k^4 r^6 |(m^2 - 1)/(m^2 + 2)|^2,  k = 2 pi/lambda
 *
 * @param radius_m radius, m
 * @param wavelength_m wavelength, m
 * @param index refractive index, 1
 * @returns cross-section, m2
 *
 * Source: Rayleigh's law, textbook. Range: 2 pi r/lambda far below 1; beyond it is too high for ice in the
 * ultraviolet.
 */
export function rayleighScattering(
  radius_m: number,
  wavelength_m: number,
  index: RefractiveIndex,
): number {
  const { re, im } = polarisability(index)
  const waveNumber = (2 * Math.PI) / wavelength_m
  return ((8 * Math.PI) / 3) * waveNumber ** 4 * radius_m ** 6 * (re * re + im * im)
}
