import type { Cases, Statistics, Weights } from './types.ts'

/** What varies by less than this share of its mean does not vary. */
const ROUNDING = 1e-12

type ErrorMoments = Pick<Statistics, 'bias' | 'rmse' | 'correlation' | 'slope'>

/**
 * With t the truth, x the estimate, e = x - t and < > the mean over the cases that have an estimate:
 *   bias = <e>,  rmse = sqrt(<e^2>)                                  in the unit of the quantity
 *   correlation = <t' x'> / sqrt(<t'^2> <x'^2>)  (Pearson),  slope = <t' x'> / <t'^2>           pure numbers
 * where ' is the departure from the mean; the slope is that of the least-squares line of estimate on truth.
 * Textbook definitions (common practice, no source). Correlation and slope are null where what they divide by
 * does not vary.
 */
export function errorMoments(cases: Cases, weights: Weights): ErrorMoments {
  const { truth, estimate } = cases
  let count = 0
  let truths = 0
  let errors = 0
  let squares = 0
  for (let i = 0; i < truth.length; i++) {
    if (weights[i] === 0 || Number.isNaN(estimate[i])) continue
    const error = estimate[i] - truth[i]
    count += weights[i]
    truths += weights[i] * truth[i]
    errors += weights[i] * error
    squares += weights[i] * error ** 2
  }
  if (count === 0) return { bias: null, rmse: null, correlation: null, slope: null }
  const means = { truth: truths / count, estimate: (truths + errors) / count }
  return {
    bias: errors / count,
    rmse: Math.sqrt(squares / count),
    ...relation(cases, weights, means),
  }
}

function relation(
  { truth, estimate }: Cases,
  weights: Weights,
  mean: { truth: number; estimate: number },
): Pick<ErrorMoments, 'correlation' | 'slope'> {
  let count = 0
  let truthSquares = 0
  let estimateSquares = 0
  let products = 0
  for (let i = 0; i < truth.length; i++) {
    if (weights[i] === 0 || Number.isNaN(estimate[i])) continue
    const t = truth[i] - mean.truth
    const x = estimate[i] - mean.estimate
    count += weights[i]
    truthSquares += weights[i] * t * t
    estimateSquares += weights[i] * x * x
    products += weights[i] * t * x
  }
  if (!varies(truthSquares / count, mean.truth)) return { correlation: null, slope: null }
  const slope = products / truthSquares
  if (!varies(estimateSquares / count, mean.estimate)) return { correlation: null, slope }
  const correlation = products / Math.sqrt(truthSquares) / Math.sqrt(estimateSquares)
  // Rounding may carry it past one.
  return { correlation: Math.max(-1, Math.min(1, correlation)), slope }
}

function varies(variance: number, mean: number): boolean {
  return variance > (ROUNDING * mean) ** 2
}
