import { mieCrossSection } from './mieCrossSection.ts'
import { mieEfficiencies } from './mieEfficiencies.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * Phase function of a homogeneous sphere in unpolarised light (Lorenz-Mie), normalised so that its integral over all
 * directions is one (not 4 pi).
 *
 *   p(Theta) = (d sigma/d Omega) / sigma_sca = (|S1|^2 + |S2|^2) / (2 pi x^2 Q_sca)
 *
 * @param sizeParameter x = 2 pi r/lambda
 * @param index refractive index, 1
 * @param angle_rad scattering angle Theta, rad; pi is straight back
 * @returns share of the scattered light per solid angle, 1/sr
 *
 * Source: Bohren and Huffman 1983, chapter 4, from memory. Range: as for `mieCoefficients`.
 */
export function miePhaseFunction(
  sizeParameter: number,
  index: RefractiveIndex,
  angle_rad: number,
): number {
  // At a wavelength of 2 pi the radius is the size parameter.
  const differential = mieCrossSection(sizeParameter, 2 * Math.PI, index, angle_rad)
  const { scattering } = mieEfficiencies(sizeParameter, index)
  return differential / (scattering * Math.PI * sizeParameter * sizeParameter)
}
