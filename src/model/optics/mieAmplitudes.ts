import type { MieCoefficients } from './mieCoefficients.ts'

/** Complex amplitudes of the light scattered with its field across (S1) and along (S2) the scattering plane. */
export interface MieAmplitudes {
  s1Re: number
  s1Im: number
  s2Re: number
  s2Im: number
}

/**
 * Scattering amplitudes of a homogeneous sphere (Lorenz-Mie).
 *
 *   S1 = sum (2n + 1)/(n(n + 1)) (a_n pi_n + b_n tau_n),  S2 with pi_n and tau_n exchanged
 *   pi_(n+1) = [(2n + 1) mu pi_n - (n + 1) pi_(n-1)]/n,  tau_n = n mu pi_n - (n + 1) pi_(n-1),  mu = cos Theta
 *
 * @param coefficients a_n and b_n of the sphere
 * @param angle_rad scattering angle Theta, rad; pi is straight back
 * @returns both amplitudes, 1; (|S1|^2 + |S2|^2) / (2 k^2) is the differential cross-section, k = 2 pi/lambda
 *
 * Source: Bohren and Huffman 1983, chapter 4, from memory. Range: as for `mieCoefficients`.
 */
export function mieAmplitudes(coefficients: MieCoefficients, angle_rad: number): MieAmplitudes {
  const { aRe, aIm, bRe, bIm } = coefficients
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
  return { s1Re, s1Im, s2Re, s2Im }
}
