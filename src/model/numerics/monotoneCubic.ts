/** A once continuously differentiable curve through given points. */
export interface Curve {
  value(x: number): number
  slope(x: number): number
}

/**
 * Monotone piecewise cubic through (x, y): C1, no overshoot between knots, so that a temperature profile
 * has a lapse rate without jumps. Outside the knots it goes on as a straight line with the end slope.
 *
 * Knot slopes: weighted harmonic mean of the neighbouring secants, zero at local extremes
 * (Fritsch and Butland 1984, SIAM J. Sci. Stat. Comput. 5, 300; formula from memory);
 * end slopes: one-sided three-point formula, limited to keep the end interval monotone.
 *
 * @param x strictly increasing knots, at least one
 * @param y values at the knots
 */
export function monotoneCubic(x: readonly number[], y: readonly number[]): Curve {
  const slopes = knotSlopes(x, y)
  const last = x.length - 1
  return {
    value(at) {
      if (at <= x[0]) return y[0] + slopes[0] * (at - x[0])
      if (at >= x[last]) return y[last] + slopes[last] * (at - x[last])
      const i = intervalOf(x, at)
      const h = x[i + 1] - x[i]
      const s = (at - x[i]) / h
      const r = 1 - s
      return (
        r * r * ((1 + 2 * s) * y[i] + s * h * slopes[i]) +
        s * s * ((3 - 2 * s) * y[i + 1] - r * h * slopes[i + 1])
      )
    },
    slope(at) {
      if (at <= x[0]) return slopes[0]
      if (at >= x[last]) return slopes[last]
      const i = intervalOf(x, at)
      const h = x[i + 1] - x[i]
      const s = (at - x[i]) / h
      const secant = (y[i + 1] - y[i]) / h
      return (
        6 * s * (1 - s) * secant +
        (1 - s) * (1 - 3 * s) * slopes[i] +
        s * (3 * s - 2) * slopes[i + 1]
      )
    },
  }
}

function intervalOf(x: readonly number[], at: number): number {
  let low = 0
  let high = x.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (x[middle] <= at) low = middle
    else high = middle
  }
  return low
}

function knotSlopes(x: readonly number[], y: readonly number[]): number[] {
  const n = x.length
  if (n === 1) return [0]
  const h = x.slice(1).map((next, i) => next - x[i])
  const secants = h.map((width, i) => (y[i + 1] - y[i]) / width)
  if (n === 2) return [secants[0], secants[0]]
  const slopes = new Array<number>(n)
  slopes[0] = endSlope(h[0], h[1], secants[0], secants[1])
  slopes[n - 1] = endSlope(h[n - 2], h[n - 3], secants[n - 2], secants[n - 3])
  for (let i = 1; i < n - 1; i++) {
    const [before, after] = [secants[i - 1], secants[i]]
    const [w1, w2] = [2 * h[i] + h[i - 1], h[i] + 2 * h[i - 1]]
    slopes[i] = before * after > 0 ? (w1 + w2) / (w1 / before + w2 / after) : 0
  }
  return slopes
}

function endSlope(h0: number, h1: number, secant0: number, secant1: number): number {
  const slope = ((2 * h0 + h1) * secant0 - h0 * secant1) / (h0 + h1)
  if (slope * secant0 <= 0) return 0
  if (secant0 * secant1 <= 0 && Math.abs(slope) > 3 * Math.abs(secant0)) return 3 * secant0
  return slope
}
