import type { Cases, Weights } from './types.ts'

/**
 * Whether the truth lies within the stated uncertainty, |estimate - truth| <= uncertainty; null where there is no
 * estimate or no uncertainty.
 */
export function isWithin(truth: number, estimate: number, uncertainty: number): boolean | null {
  const error = Math.abs(estimate - truth)
  return Number.isNaN(error) || Number.isNaN(uncertainty) ? null : error <= uncertainty
}

/**
 * Share of the cases with an uncertainty whose truth lies within it. Where the uncertainty is the standard deviation
 * of a Gaussian error, it is erf(1/sqrt 2) = 0.683. Null where no case states an uncertainty.
 */
export function coverage({ truth, estimate, uncertainty }: Cases, weights: Weights): number | null {
  let count = 0
  let within = 0
  for (let i = 0; i < truth.length; i++) {
    const isCovered = isWithin(truth[i], estimate[i], uncertainty[i])
    if (isCovered === null) continue
    count += weights[i]
    if (isCovered) within += weights[i]
  }
  return count === 0 ? null : within / count
}
