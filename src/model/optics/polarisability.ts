import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * Polarisability of a small sphere in units of its radius cubed.
 *
 *   (m^2 - 1) / (m^2 + 2),  m = n + ik
 *
 * @param index refractive index of the sphere, 1
 * @returns real and imaginary part, 1 (the imaginary part is positive for an absorbing sphere)
 *
 * Source: Clausius-Mossotti relation, textbook. Range: any refractive index.
 */
export function polarisability({ n, k }: RefractiveIndex): { re: number; im: number } {
  const re = n * n - k * k
  const im = 2 * n * k
  const norm = (re + 2) * (re + 2) + im * im
  return { re: ((re - 1) * (re + 2) + im * im) / norm, im: (3 * im) / norm }
}
