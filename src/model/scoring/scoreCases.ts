import { randomStream } from '../numerics/random.ts'
import { coverage } from './coverage.ts'
import { detectionRates } from './detectionRates.ts'
import { errorMoments } from './errorMoments.ts'
import { byAbsoluteError, medianAbsoluteError } from './medianAbsoluteError.ts'
import { percentileInterval } from './percentileInterval.ts'
import {
  type Bootstrap,
  type Cases,
  type Score,
  STATISTICS,
  type Statistics,
  type Weights,
} from './types.ts'

/**
 * All statistics of a set of cases with their bootstrap intervals. Whole scenes are drawn, with all their cases,
 * since the draws of one scene share its truth. Every set begins the random stream anew, so that a score does not
 * depend on what else is scored.
 *
 * @param threshold for hits and false alarms, in the unit of the quantity; null for none
 */
export function scoreCases(cases: Cases, threshold: number | null, bootstrap: Bootstrap): Score {
  const order = byAbsoluteError(cases)
  const statistics = (weights: Weights): Statistics => ({
    ...errorMoments(cases, weights),
    medianAbsoluteError: medianAbsoluteError(cases, order, weights),
    coverage: coverage(cases, weights),
    ...detectionRates(cases, threshold, weights),
  })
  const values = statistics(new Float64Array(cases.truth.length).fill(1))
  const draws = Array.from(resampled(cases, bootstrap), statistics)
  const scored = STATISTICS.map((name) => {
    const value = values[name]
    if (value === null) return [name, null]
    const known = draws.map((draw) => draw[name]).filter((draw) => draw !== null)
    const interval = known.length === 0 ? { low: null, high: null } : percentileInterval(known)
    return [name, { value, ...interval }]
  })
  return { ...counts(cases, order), ...Object.fromEntries(scored) }
}

function counts({ scenes, uncertainty }: Cases, order: Uint32Array) {
  const uncertainties = order.filter((i) => !Number.isNaN(uncertainty[i])).length
  return { scenes, estimates: order.length, uncertainties }
}

/** How often each case counts when as many scenes as there are have been drawn, with replacement; overwritten by the next. */
function* resampled({ scene, scenes }: Cases, { seed, resamples }: Bootstrap): Generator<Weights> {
  // The one scene would be drawn each time, and the interval would have no width.
  if (scenes < 2) return
  const { uniform } = randomStream(seed)
  const drawn = new Float64Array(scenes)
  const weights = new Float64Array(scene.length)
  for (let resample = 0; resample < resamples; resample++) {
    drawn.fill(0)
    for (let i = 0; i < scenes; i++) drawn[Math.floor(uniform() * scenes)]++
    for (let i = 0; i < scene.length; i++) weights[i] = drawn[scene[i]]
    yield weights
  }
}
