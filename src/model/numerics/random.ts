import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64'
import { mersenne } from 'pure-rand/generator/mersenne'

/** A stream of random numbers that depends on its seed alone. */
export interface RandomStream {
  /** Evenly spread over [0, 1). */
  uniform(): number
  /** Normal with mean 0 and standard deviation 1, by the transform of Box and Muller 1958. */
  normal(): number
}

/** @param seed whole number from 0 to 2^32 - 1 */
export function randomStream(seed: number): RandomStream {
  const generator = mersenne(seed)
  const uniform = () => uniformFloat64(generator)
  return {
    uniform,
    // 1 - u lies in (0, 1], where the logarithm is finite.
    normal: () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform()),
  }
}
