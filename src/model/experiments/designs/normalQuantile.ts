/** Beyond this many standard deviations there is nothing that double precision could tell from zero. */
const FARTHEST = 8

/**
 * Phi(x) = 1/2 + phi(x) (x + x^3/3 + x^5/(3 5) + ...), the cumulative normal distribution by its Taylor series
 * (common practice, no source). Absolute error below 1e-15 for |x| up to 8.
 */
export function cumulativeNormal(x: number): number {
  if (Math.abs(x) > FARTHEST) return x > 0 ? 1 : 0
  let term = x
  let sum = x
  for (let k = 3; Math.abs(term) > Number.EPSILON * Math.abs(sum); k += 2) {
    term *= (x * x) / k
    sum += term
  }
  return 1 / 2 + (sum * Math.exp((-x * x) / 2)) / Math.sqrt(2 * Math.PI)
}

/** Chance that a normal number lies between two limits, in standard deviations. */
export function chanceBetween(from: number, to: number): number {
  return cumulativeNormal(to) - cumulativeNormal(from)
}

const BISECTIONS = 60

/** Quantile of the standard normal distribution cut off at two limits, by bisection. */
export function normalQuantile(from: number, to: number): (share: number) => number {
  const least = Math.max(from, -FARTHEST)
  const most = Math.min(to, FARTHEST)
  const below = cumulativeNormal(least)
  const inside = chanceBetween(least, most)
  return (share) => {
    const wanted = below + share * inside
    let [low, high] = [least, most]
    for (let i = 0; i < BISECTIONS && low < high; i++) {
      const middle = (low + high) / 2
      if (cumulativeNormal(middle) < wanted) low = middle
      else high = middle
    }
    return (low + high) / 2
  }
}
