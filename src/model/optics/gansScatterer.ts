import { InputError } from '../errors.ts'
import { gansPolarisability } from './gansPolarisability.ts'
import type { Scatterer } from './scatterer.ts'

/**
 * Law of scattering by randomly oriented spheroids far smaller than the wavelength, in unpolarised light.
 *
 *   d sigma/d Omega = k^4 r^6 [45 A + 13 G + (45 A + G) cos^2 Theta] / 90,  k = 2 pi/lambda
 *   A = |(alpha_along + 2 alpha_across)/3|^2,  G = |alpha_along - alpha_across|^2
 *
 * @param axisRatio length along the axis of symmetry over width across it: above 1 prolate, below 1 oblate, 1 a sphere
 * @returns the law; its radius is that of the sphere of equal volume
 * @throws InputError unless the axis ratio is a number above 0
 *
 * Source: Gans 1912, Ann. Phys. 37, 881, and the mean over orientations of textbooks on light scattering by molecules;
 * both from memory. Range: every axis times |m| far below the wavelength/2 pi.
 */
export function gansScatterer(axisRatio: number): Scatterer {
  if (!(axisRatio > 0 && Number.isFinite(axisRatio))) {
    throw new InputError(`axis ratio ${axisRatio}: a spheroid needs a finite one above 0`)
  }
  return (radius_m, wavelength_m, index, angle_rad) => {
    const { meanSquare, anisotropySquare } = gansPolarisability(index, axisRatio)
    const cosine = Math.cos(angle_rad)
    const pattern =
      (45 * meanSquare +
        13 * anisotropySquare +
        (45 * meanSquare + anisotropySquare) * cosine * cosine) /
      90
    return ((2 * Math.PI) / wavelength_m) ** 4 * radius_m ** 6 * pattern
  }
}
