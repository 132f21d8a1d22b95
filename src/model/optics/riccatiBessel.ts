/**
 * Riccati-Bessel functions of real argument, psi_n = x j_n(x) and eta_n = x y_n(x), for n = 0 to the order.
 *
 *   f_(n+1) = (2n + 1)/x f_n - f_(n-1);  psi downward (Miller), eta upward
 *
 * @param x argument, above 0
 * @param order highest n
 * @returns both functions by n
 *
 * Source: recurrences of the spherical Bessel functions, textbook. Range: x from 1e-4 to 100 with an order up to
 * x + 4 x^(1/3) + 9; beyond, the unscaled recurrences may overflow.
 */
export function riccatiBessel(x: number, order: number): { psi: Float64Array; eta: Float64Array } {
  const eta = new Float64Array(order + 1)
  let before = Math.sin(x)
  let here = -Math.cos(x)
  eta[0] = here
  for (let n = 1; n <= order; n++) {
    const next = ((2 * n - 1) / x) * here - before
    before = here
    here = next
    eta[n] = here
  }
  return { psi: firstKind(x, order), eta }
}

function firstKind(x: number, order: number): Float64Array {
  const psi = new Float64Array(order + 1)
  let above = 0
  let here = 1e-300
  for (let n = order + 16; n >= 0; n--) {
    if (n <= order) psi[n] = here
    const next = ((2 * n + 1) / x) * here - above
    above = here
    here = next
  }
  // Scaled by whichever of the two closed forms is not near its zero.
  const zeroth = Math.sin(x)
  const first = Math.sin(x) / x - Math.cos(x)
  const scale = Math.abs(zeroth) > Math.abs(first) ? zeroth / (psi[0] ?? 1) : first / (psi[1] ?? 1)
  return psi.map((value) => value * scale)
}
