import type { Cases, Weights } from './types.ts'

/** Numbers of the cases that have an estimate, by increasing absolute error; made once for all resamples. */
export function byAbsoluteError({ truth, estimate }: Cases): Uint32Array {
  const errors = truth.map((value, i) => Math.abs(estimate[i] - value))
  const present = Uint32Array.from(errors.keys()).filter((i) => !Number.isNaN(errors[i]))
  return present.sort((i, j) => errors[i] - errors[j])
}

/**
 * Median of |estimate - truth|, in the unit of the quantity; of an even number of cases the mean of the middle two
 * (common practice, no source). Null without estimates.
 *
 * @param order cases by increasing absolute error
 */
export function medianAbsoluteError(
  { truth, estimate }: Cases,
  order: Uint32Array,
  weights: Weights,
): number | null {
  let count = 0
  for (const i of order) count += weights[i]
  if (count === 0) return null
  const error = (place: number) => {
    let passed = 0
    for (const i of order) {
      passed += weights[i]
      if (passed > place) return Math.abs(estimate[i] - truth[i])
    }
    return Number.NaN
  }
  return (error(Math.floor((count - 1) / 2)) + error(Math.floor(count / 2))) / 2
}
