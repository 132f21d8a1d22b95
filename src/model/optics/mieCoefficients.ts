import type { RefractiveIndex } from './refractiveIndex.ts'
import { riccatiBessel } from './riccatiBessel.ts'

/** Coefficients of the multipoles n = 1, 2, ...; index 0 is left at zero. */
export interface MieCoefficients {
  aRe: Float64Array
  aIm: Float64Array
  bRe: Float64Array
  bIm: Float64Array
  /** Re a_n - |a_n|^2 + Re b_n - |b_n|^2, free of cancellation. */
  absorbed: Float64Array
}

/**
 * Coefficients a_n, b_n of scattering by a homogeneous sphere (Lorenz-Mie).
 *
 *   a_n = (A_n psi_n + psi_(n+1)) / (A_n xi_n + xi_(n+1)),  A_n = (n + 1)/x (1/m^2 - 1) - R_n/m;  b_n with B_n = -m R_n
 *   xi_n = psi_n + i eta_n;  R_n = psi_(n+1)(m x)/psi_n(m x);  m = n + ik, time factor exp(-i omega t)
 *   Re a_n - |a_n|^2 = -Im A_n / |denominator|^2, by psi_(n+1) eta_n - psi_n eta_(n+1) = 1
 *
 * The usual form with the logarithmic derivative D_n = (n + 1)/(m x) - R_n is the same, but for small x its numerator of
 * b_n is a difference of nearly equal numbers. R_n and psi_n run downward, eta_n upward: each in its stable direction.
 *
 * @param sizeParameter x = 2 pi r/lambda
 * @param index refractive index, 1
 * @returns coefficients, 1
 *
 * Source: Bohren and Huffman 1983, chapter 4, from memory; this form and that of the absorbed share are derived. Range:
 * x from 1e-4 to 100; at 1000 and 10000 it still gives the cases of Wiscombe 1979.
 */
export function mieCoefficients(sizeParameter: number, index: RefractiveIndex): MieCoefficients {
  const x = sizeParameter
  const order = Math.ceil(x + 4 * Math.cbrt(x) + 8)
  const { psi, eta } = riccatiBessel(x, order + 1)
  const { ratioRe, ratioIm } = insideRatio(x, index, order)
  const made = {
    aRe: new Float64Array(order + 1),
    aIm: new Float64Array(order + 1),
    bRe: new Float64Array(order + 1),
    bIm: new Float64Array(order + 1),
    absorbed: new Float64Array(order + 1),
  }
  const { n: real, k: imaginary } = index
  const norm = real * real + imaginary * imaginary
  const step = contrast(index)
  for (let n = 1; n <= order; n++) {
    const waves: Waves = [psi[n] ?? 0, psi[n + 1] ?? 0, eta[n] ?? 0, eta[n + 1] ?? 0]
    const re = ratioRe[n] ?? 0
    const im = ratioIm[n] ?? 0
    const electricRe = ((n + 1) / x) * step.re - (re * real + im * imaginary) / norm
    const electricIm = ((n + 1) / x) * step.im - (im * real - re * imaginary) / norm
    const a = coefficient(electricRe, electricIm, waves)
    const b = coefficient(im * imaginary - re * real, -(re * imaginary + im * real), waves)
    made.aRe[n] = a.re
    made.aIm[n] = a.im
    made.bRe[n] = b.re
    made.bIm[n] = b.im
    made.absorbed[n] = a.absorbed + b.absorbed
  }
  return made
}

/** 1/m^2 - 1, exact for m near 1. */
function contrast({ n, k }: RefractiveIndex): { re: number; im: number } {
  const norm = (n * n + k * k) ** 2
  const surplus = (1 - n) * (1 + n) + k * k
  return { re: (surplus * (n * n - k * k) - 4 * n * n * k * k) / norm, im: (-2 * n * k) / norm }
}

/** psi_n, psi_(n+1), eta_n, eta_(n+1). */
type Waves = readonly [number, number, number, number]

/** The quotient of the docstring for the complex factor c = cRe + i cIm in front of psi_n and xi_n. */
function coefficient(cRe: number, cIm: number, [psi, psiAfter, eta, etaAfter]: Waves) {
  const upRe = cRe * psi + psiAfter
  const upIm = cIm * psi
  const downRe = upRe - cIm * eta
  const downIm = upIm + cRe * eta + etaAfter
  const norm = downRe * downRe + downIm * downIm
  return {
    re: (upRe * downRe + upIm * downIm) / norm,
    im: (upIm * downRe - upRe * downIm) / norm,
    absorbed: -cIm / norm,
  }
}

/** R_n(m x) for n up to the order, by 1/R_(n-1) = (2n + 1)/z - R_n from far above. */
function insideRatio(x: number, { n: real, k: imaginary }: RefractiveIndex, order: number) {
  const ratioRe = new Float64Array(order + 1)
  const ratioIm = new Float64Array(order + 1)
  const norm = x * (real * real + imaginary * imaginary)
  // Below the turning point at |m x| an error of the start value does not die out.
  const turning = x * Math.hypot(real, imaginary)
  const start = Math.ceil(Math.max(order, turning + 4 * Math.cbrt(turning))) + 16
  let re = 0
  let im = 0
  for (let n = start; n > 1; n--) {
    const belowRe = ((2 * n + 1) * real) / norm - re
    const belowIm = (-(2 * n + 1) * imaginary) / norm - im
    const belowNorm = belowRe * belowRe + belowIm * belowIm
    re = belowRe / belowNorm
    im = -belowIm / belowNorm
    if (n - 1 <= order) {
      ratioRe[n - 1] = re
      ratioIm[n - 1] = im
    }
  }
  return { ratioRe, ratioIm }
}
