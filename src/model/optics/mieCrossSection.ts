import { mieAmplitudes } from './mieAmplitudes.ts'
import { mieCoefficients } from './mieCoefficients.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * Differential scattering cross-section of a homogeneous sphere in unpolarised light (Lorenz-Mie).
 *
 *   d sigma/d Omega = (|S1|^2 + |S2|^2) / (2 k^2),  k = 2 pi/lambda
 *
 * @param radius_m radius, m
 * @param wavelength_m wavelength, m
 * @param index refractive index, 1
 * @param angle_rad scattering angle Theta, rad; pi is straight back
 * @returns cross-section per solid angle, m2/sr
 *
 * Source: Bohren and Huffman 1983, chapter 4, from memory. Range: as for `mieCoefficients`.
 */
export function mieCrossSection(
  radius_m: number,
  wavelength_m: number,
  index: RefractiveIndex,
  angle_rad: number,
): number {
  const waveNumber = (2 * Math.PI) / wavelength_m
  const coefficients = mieCoefficients(waveNumber * radius_m, index)
  const { s1Re, s1Im, s2Re, s2Im } = mieAmplitudes(coefficients, angle_rad)
  const square = s1Re * s1Re + s1Im * s1Im + s2Re * s2Re + s2Im * s2Im
  return square / (2 * waveNumber * waveNumber)
}
