import { binsOfTruth } from './binsOfTruth.ts'
import { scoreCases } from './scoreCases.ts'
import { truthCuts } from './truthCuts.ts'
import type { BinScore, Bootstrap, Cases, Score } from './types.ts'

export interface ScoreChoices extends Bootstrap {
  /** For hits and false alarms, in the unit of the quantity; null for none. */
  threshold: number | null
  /** Increasing limits between bins of truth, in the unit of the quantity; null for quartiles. */
  cuts: readonly number[] | null
}

/** How well one quantity was estimated, over all and in bins of truth. */
export interface QuantityScore {
  overall: Score
  bins: BinScore[]
}

export function scoreQuantity(
  cases: Cases,
  { threshold, cuts, ...bootstrap }: ScoreChoices,
): QuantityScore {
  return {
    overall: scoreCases(cases, threshold, bootstrap),
    bins: binsOfTruth(cases, cuts ?? truthCuts(cases.truth)).map(({ from, to, cases: inside }) => ({
      from,
      to,
      ...scoreCases(inside, threshold, bootstrap),
    })),
  }
}
