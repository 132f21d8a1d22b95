import { InputError } from '../../errors.ts'
import { randomStream } from '../../numerics/random.ts'
import type { Design } from './design.ts'
import { sobolDirectionTable } from './sobolDirectionTable.ts'

const BITS = 32

/** Dimensions for which there are direction numbers. */
export const MOST_SOBOL_DIMENSIONS = sobolDirectionTable.length + 1

/**
 * The Sobol sequence (Sobol 1967) in the order of Antonov and Saleev 1979, direction numbers of Joe and Kuo 2008, all
 * from memory: point i is the exclusive or of the direction numbers v_k at the digits of the Gray code i ^ (i >> 1).
 * The first 2^m points fill every one of the 2^m equal strata of each dimension once.
 *
 * @param seed of a random digital shift: the same bits are exclusive-ored into all points, half a last digit is added,
 *   so that no coordinate is 0; without it the points are the published ones, from the origin on
 */
export function sobolSequence(dims: number, n: number, seed?: number): Design {
  if (dims > MOST_SOBOL_DIMENSIONS) {
    throw new InputError(
      `a Sobol sequence in ${dims} dimensions; allowed: up to ${MOST_SOBOL_DIMENSIONS}`,
    )
  }
  const directions = Array.from({ length: dims }, (_, dimension) => directionNumbers(dimension))
  const shifts = digitalShift(dims, seed)
  const middle = seed === undefined ? 0 : 1 / 2
  return {
    count: n,
    dims,
    point(index) {
      const gray = (index ^ (index >>> 1)) >>> 0
      return directions.map((numbers, dimension) => {
        let digits = shifts[dimension]
        for (let k = 0; gray >>> k !== 0 && k < BITS; k++) {
          if ((gray >>> k) & 1) digits ^= numbers[k]
        }
        return ((digits >>> 0) + middle) / 2 ** BITS
      })
    },
  }
}

function digitalShift(dims: number, seed: number | undefined): Uint32Array {
  if (seed === undefined) return new Uint32Array(dims)
  const { uniform } = randomStream(seed)
  return Uint32Array.from({ length: dims }, () => Math.floor(uniform() * 2 ** BITS))
}

/**
 * v_k = m_k 2^(32 - k), with m_k = 2 a_1 m_(k-1) ^ 4 a_2 m_(k-2) ^ ... ^ 2^s m_(k-s) ^ m_(k-s) beyond the given ones;
 * in terms of v the factors 2^j turn into shifts to the right.
 */
function directionNumbers(dimension: number): Uint32Array {
  const numbers = new Uint32Array(BITS)
  if (dimension === 0) return numbers.map((_, k) => 2 ** (BITS - 1 - k))
  const { degree, coefficients, first } = sobolDirectionTable[dimension - 1]
  for (let k = 0; k < BITS; k++) {
    if (k < degree) {
      numbers[k] = first[k] * 2 ** (BITS - 1 - k)
      continue
    }
    numbers[k] = numbers[k - degree] ^ (numbers[k - degree] >>> degree)
    for (let j = 1; j < degree; j++) {
      if ((coefficients >>> (degree - 1 - j)) & 1) numbers[k] ^= numbers[k - j]
    }
  }
  return numbers
}
