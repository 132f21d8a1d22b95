import { randomStream } from '../../numerics/random.ts'
import type { Design } from './design.ts'

/**
 * Latin hypercube (McKay, Beckman and Conover 1979, from memory): in each dimension one point in each of n equal strata,
 * at random inside it, the strata in random order.
 *
 * @param seed whole number from 0 to 2^32 - 1
 */
export function latinHypercube(seed: number, n: number, dims: number): Design {
  const random = randomStream(seed)
  const coordinates = Array.from({ length: dims }, () => {
    const strata = shuffled(n, random.uniform)
    return Float64Array.from(strata, (stratum) => inStratum(stratum, n, random.uniform()))
  })
  return { count: n, dims, point: (index) => coordinates.map((values) => values[index]) }
}

/** 0 to n - 1 in random order, by the exchanges of Fisher and Yates. */
function shuffled(n: number, uniform: () => number): Uint32Array {
  const order = Uint32Array.from({ length: n }, (_, i) => i)
  for (let i = n - 1; i > 0; i--) {
    const j = Math.floor(uniform() * (i + 1))
    ;[order[i], order[j]] = [order[j], order[i]]
  }
  return order
}

/** Rounding must not carry a point into the next stratum. */
function inStratum(stratum: number, n: number, share: number): number {
  const value = (stratum + share) / n
  return Math.floor(value * n) > stratum ? stratum / n : value
}
