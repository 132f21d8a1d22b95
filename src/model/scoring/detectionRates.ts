import type { Cases, Statistics, Weights } from './types.ts'

/**
 * With an event where a value reaches the threshold:
 *   hit rate         = cases with event in truth and estimate / cases with event in truth
 *   false-alarm rate = cases with event in the estimate alone / cases without event in truth
 * (common practice, no source). A case whose retrieval gave no value counts as no event seen: a miss, or rightly
 * silent. Null where there is no threshold or nothing to divide by.
 *
 * @param threshold in the unit of the quantity
 */
export function detectionRates(
  { truth, estimate }: Cases,
  threshold: number | null,
  weights: Weights,
): Pick<Statistics, 'hitRate' | 'falseAlarmRate'> {
  if (threshold === null) return { hitRate: null, falseAlarmRate: null }
  const events = { all: 0, seen: 0 }
  const rest = { all: 0, seen: 0 }
  for (let i = 0; i < truth.length; i++) {
    const kind = truth[i] >= threshold ? events : rest
    kind.all += weights[i]
    if (estimate[i] >= threshold) kind.seen += weights[i]
  }
  const share = ({ all, seen }: typeof events) => (all === 0 ? null : seen / all)
  return { hitRate: share(events), falseAlarmRate: share(rest) }
}
