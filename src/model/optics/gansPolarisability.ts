import { depolarisationFactors } from './depolarisationFactors.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/** Polarisability of a small spheroid, in units of the cubed radius of the sphere of equal volume. */
export interface GansPolarisability {
  /** Imaginary part of the mean over all orientations, (alpha_along + 2 alpha_across)/3. */
  meanIm: number
  /** |mean|^2. */
  meanSquare: number
  /** |alpha_along - alpha_across|^2. */
  anisotropySquare: number
}

/**
 * Polarisability of a spheroid far smaller than the wavelength, as random orientation needs it.
 *
 *   alpha_j = (1/3) (m^2 - 1) / [1 + L_j (m^2 - 1)],  m = n + ik, L_j depolarisation factor along or across the axis
 *
 * @param index refractive index, 1
 * @param axisRatio length along the axis of symmetry over width across it
 * @returns mean and anisotropy, 1
 *
 * Source: Gans 1912, Ann. Phys. 37, 881, from memory. Range: every axis times |m| far below the wavelength/2 pi.
 */
export function gansPolarisability(index: RefractiveIndex, axisRatio: number): GansPolarisability {
  const factors = depolarisationFactors(axisRatio)
  const along = response(index, factors.along)
  const across = response(index, factors.across)
  const meanRe = (along.re + 2 * across.re) / 3
  const meanIm = (along.im + 2 * across.im) / 3
  const [surplusRe, surplusIm] = [along.re - across.re, along.im - across.im]
  return {
    meanIm,
    meanSquare: meanRe * meanRe + meanIm * meanIm,
    anisotropySquare: surplusRe * surplusRe + surplusIm * surplusIm,
  }
}

/** alpha_j of the docstring. */
function response({ n, k }: RefractiveIndex, factor: number): { re: number; im: number } {
  const re = n * n - k * k - 1
  const im = 2 * n * k
  const belowRe = 1 + factor * re
  const belowIm = factor * im
  const norm = 3 * (belowRe * belowRe + belowIm * belowIm)
  return { re: (re * belowRe + im * belowIm) / norm, im: im / norm }
}
