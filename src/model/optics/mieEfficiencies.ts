import { mieCoefficients } from './mieCoefficients.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * Scattering and absorption of a homogeneous sphere over its geometric cross-section (Lorenz-Mie).
 *
 *   Q_sca = (2/x^2) sum (2n + 1)(|a_n|^2 + |b_n|^2),  Q_abs = (2/x^2) sum (2n + 1)(Re a_n - |a_n|^2 + Re b_n - |b_n|^2)
 *
 * @param sizeParameter x = 2 pi r/lambda
 * @param index refractive index, 1
 * @returns both efficiencies, 1; extinction is their sum
 *
 * Source: Bohren and Huffman 1983, chapter 4, from memory. Range: as for `mieCoefficients`.
 */
export function mieEfficiencies(
  sizeParameter: number,
  index: RefractiveIndex,
): { scattering: number; absorption: number } {
  const { aRe, aIm, bRe, bIm, absorbed } = mieCoefficients(sizeParameter, index)
  let scattering = 0
  let absorption = 0
  for (let n = 1; n < aRe.length; n++) {
    const electric = (aRe[n] ?? 0) ** 2 + (aIm[n] ?? 0) ** 2
    const magnetic = (bRe[n] ?? 0) ** 2 + (bIm[n] ?? 0) ** 2
    scattering += (2 * n + 1) * (electric + magnetic)
    absorption += (2 * n + 1) * (absorbed[n] ?? 0)
  }
  const factor = 2 / (sizeParameter * sizeParameter)
  return { scattering: factor * scattering, absorption: factor * absorption }
}
