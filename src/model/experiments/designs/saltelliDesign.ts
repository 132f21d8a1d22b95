import type { Design } from './design.ts'
import { sobolSequence } from './sobolSequence.ts'

/** Which point of its block a point of the design is: A, B, or A with coordinate i from B. */
export type SaltelliRole = 'a' | 'b' | number

export interface SaltelliDesign extends Design {
  /** Number of blocks of dims + 2 points. */
  samples: number
  /** Index of a point of the design. */
  index(sample: number, role: SaltelliRole): number
}

/**
 * The points from which first-order and total indices follow (Saltelli et al. 2010, from memory): A and B are the first
 * and the last half of a shifted Sobol sequence in 2 dims dimensions; each block holds A, B, and A with one coordinate
 * after the other taken from B.
 *
 * @param n number of blocks; a power of two fills the cube evenly
 */
export function saltelliDesign(seed: number, n: number, dims: number): SaltelliDesign {
  const pairs = sobolSequence(2 * dims, n, seed)
  const block = dims + 2
  const offset = (role: SaltelliRole) => (role === 'a' ? 0 : role === 'b' ? 1 : role + 2)
  return {
    count: n * block,
    dims,
    samples: n,
    index: (sample, role) => sample * block + offset(role),
    point(index) {
      const pair = pairs.point(Math.floor(index / block))
      const [a, b] = [pair.slice(0, dims), pair.slice(dims)]
      const place = index % block
      if (place === 1) return b
      return place === 0 ? a : a.with(place - 2, b[place - 2])
    },
  }
}
