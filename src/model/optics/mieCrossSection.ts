import { mieCoefficients } from './mieCoefficients.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * Differential scattering cross-section of a homogeneous sphere in unpolarised light (Lorenz-Mie).
 *
 *   d sigma/d Omega = (|S1|^2 + |S2|^2) / (2 k^2),  k = 2 pi/lambda
 *   S1 = sum (2n + 1)/(n(n + 1)) (a_n pi_n + b_n tau_n),  S2 with pi_n and tau_n exchanged
 *   pi_(n+1) = [(2n + 1) mu pi_n - (n + 1) pi_(n-1)]/n,  tau_n = n mu pi_n - (n + 1) pi_(n-1),  mu = cos Theta
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
  const { aRe, aIm, bRe, bIm } = mieCoefficients(waveNumber * radius_m, index)
  const cosine = Math.cos(angle_rad)
  let pi = 1
  let piBefore = 0
  let [s1Re, s1Im, s2Re, s2Im] = [0, 0, 0, 0]
  for (let n = 1; n < aRe.length; n++) {
    const tau = n * cosine * pi - (n + 1) * piBefore
    const weight = (2 * n + 1) / (n * (n + 1))
    s1Re += weight * ((aRe[n] ?? 0) * pi + (bRe[n] ?? 0) * tau)
    s1Im += weight * ((aIm[n] ?? 0) * pi + (bIm[n] ?? 0) * tau)
    s2Re += weight * ((aRe[n] ?? 0) * tau + (bRe[n] ?? 0) * pi)
    s2Im += weight * ((aIm[n] ?? 0) * tau + (bIm[n] ?? 0) * pi)
    const piNext = ((2 * n + 1) * cosine * pi - (n + 1) * piBefore) / n
    piBefore = pi
    pi = piNext
  }
  const square = s1Re * s1Re + s1Im * s1Im + s2Re * s2Re + s2Im * s2Im
  return square / (2 * waveNumber * waveNumber)
}
