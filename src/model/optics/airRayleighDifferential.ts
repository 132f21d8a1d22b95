import { airKingFactor } from './airKingFactor.ts'
import { airRayleighCrossSection } from './airRayleighCrossSection.ts'

/**
 * Differential scattering cross-section of one molecule of dry air in unpolarised light.
 *
 *   d sigma/d Omega = sigma 3/(8 pi) [(1 + rho) + (1 - rho) cos^2 Theta] / (2 + rho),  rho = 6 (F - 1)/(7 F + 3)
 *
 * rho is the depolarisation of natural light, F the King factor; sidebands (rotational Raman) are included.
 *
 * @param wavelength_m wavelength in vacuum, m
 * @param angle_rad scattering angle Theta, rad; pi is straight back
 * @returns cross-section per solid angle, m2/sr
 *
 * Source: textbook, from memory; cross-section and King factor of Bodhaine et al. 1999. Range: 0.25 to 1.1 um.
 */
export function airRayleighDifferential(wavelength_m: number, angle_rad: number): number {
  const kingFactor = airKingFactor(wavelength_m)
  const depolarisation = (6 * (kingFactor - 1)) / (7 * kingFactor + 3)
  const cosine = Math.cos(angle_rad)
  const pattern = 1 + depolarisation + (1 - depolarisation) * cosine * cosine
  const phase = ((3 / (8 * Math.PI)) * pattern) / (2 + depolarisation)
  return phase * airRayleighCrossSection(wavelength_m)
}
