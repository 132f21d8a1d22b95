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
 *   a_n = [(D_n/m + n/x) psi_n - psi_(n-1)] / [(D_n/m + n/x) xi_n - xi_(n-1)],  b_n with m D_n for D_n/m
 *   xi_n = psi_n + i eta_n;  D_n logarithmic derivative of psi_n at m x, m = n + ik, time factor exp(-i omega t)
 *   Re a_n - |a_n|^2 = -Im(D_n/m) / |denominator|^2, by psi_n eta_(n-1) - psi_(n-1) eta_n = 1
 *
 * D_n and psi_n run downward, eta_n upward: each in its stable direction.
 *
 * @param sizeParameter x = 2 pi r/lambda
 * @param index refractive index, 1
 * @returns coefficients, 1
 *
 * Source: Bohren and Huffman 1983, chapter 4, from memory; the form of the absorbed share is derived. Range: x from
 * 1e-4 to 100.
 */
export function mieCoefficients(sizeParameter: number, index: RefractiveIndex): MieCoefficients {
  const x = sizeParameter
  const order = Math.ceil(x + 4 * Math.cbrt(x) + 8)
  const { psi, eta } = riccatiBessel(x, order)
  const { dRe, dIm } = logarithmicDerivative(x, index, order)
  const made = {
    aRe: new Float64Array(order + 1),
    aIm: new Float64Array(order + 1),
    bRe: new Float64Array(order + 1),
    bIm: new Float64Array(order + 1),
    absorbed: new Float64Array(order + 1),
  }
  const norm = index.n * index.n + index.k * index.k
  for (let n = 1; n <= order; n++) {
    const waves: Waves = [psi[n - 1] ?? 0, psi[n] ?? 0, eta[n - 1] ?? 0, eta[n] ?? 0]
    const re = dRe[n] ?? 0
    const im = dIm[n] ?? 0
    const perIndexRe = (re * index.n + im * index.k) / norm
    const perIndexIm = (im * index.n - re * index.k) / norm
    const a = coefficient(perIndexRe + n / x, perIndexIm, waves)
    const b = coefficient(re * index.n - im * index.k + n / x, re * index.k + im * index.n, waves)
    made.aRe[n] = a.re
    made.aIm[n] = a.im
    made.bRe[n] = b.re
    made.bIm[n] = b.im
    made.absorbed[n] = a.absorbed + b.absorbed
  }
  return made
}

/** psi_(n-1), psi_n, eta_(n-1), eta_n. */
type Waves = readonly [number, number, number, number]

/** The quotient of the docstring for the complex factor c = cRe + i cIm in front of psi_n and xi_n. */
function coefficient(cRe: number, cIm: number, [psiBefore, psi, etaBefore, eta]: Waves) {
  const upRe = cRe * psi - psiBefore
  const upIm = cIm * psi
  const downRe = upRe - cIm * eta
  const downIm = upIm + cRe * eta - etaBefore
  const norm = downRe * downRe + downIm * downIm
  return {
    re: (upRe * downRe + upIm * downIm) / norm,
    im: (upIm * downRe - upRe * downIm) / norm,
    absorbed: -cIm / norm,
  }
}

/** D_n(m x) for n up to the order, by D_(n-1) = n/z - 1/(D_n + n/z) from far above. */
function logarithmicDerivative(
  x: number,
  { n: real, k: imaginary }: RefractiveIndex,
  order: number,
) {
  const dRe = new Float64Array(order + 1)
  const dIm = new Float64Array(order + 1)
  const norm = x * (real * real + imaginary * imaginary)
  // Below the turning point at |m x| an error of the start value does not die out.
  const turning = x * Math.hypot(real, imaginary)
  const start = Math.ceil(Math.max(order, turning + 4 * Math.cbrt(turning))) + 16
  let re = 0
  let im = 0
  for (let n = start; n > 1; n--) {
    const ratioRe = (n * real) / norm
    const ratioIm = (-n * imaginary) / norm
    const sumRe = re + ratioRe
    const sumIm = im + ratioIm
    const sumNorm = sumRe * sumRe + sumIm * sumIm
    re = ratioRe - sumRe / sumNorm
    im = ratioIm + sumIm / sumNorm
    if (n - 1 <= order) {
      dRe[n - 1] = re
      dIm[n - 1] = im
    }
  }
  return { dRe, dIm }
}
