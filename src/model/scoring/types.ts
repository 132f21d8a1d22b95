/** One quantity, estimated and true; a case is one estimate, and several draws of one scene are several cases. */
export interface Cases {
  /** Number of the scene that each case belongs to, from 0 to `scenes` - 1. */
  scene: Int32Array
  scenes: number
  /** In the unit of the quantity; never NaN. */
  truth: Float64Array
  /** NaN where the retrieval gave no value. */
  estimate: Float64Array
  /** One standard deviation as the retrieval states it; NaN where it states none. */
  uncertainty: Float64Array
}

/** How often each case counts: 1, or how often its scene was drawn. */
export type Weights = ArrayLike<number>

export const STATISTICS = [
  'bias',
  'rmse',
  'medianAbsoluteError',
  'correlation',
  'slope',
  'coverage',
  'hitRate',
  'falseAlarmRate',
] as const

export type StatisticName = (typeof STATISTICS)[number]

/** Null where a statistic does not apply, such as a slope against a truth that does not vary. */
export type Statistics = Record<StatisticName, number | null>

export interface ScoredStatistic {
  value: number
  /** 95 % bootstrap interval; null for fewer than two scenes. */
  low: number | null
  high: number | null
}

/** What a set of cases comes to. */
export interface Score extends Record<StatisticName, ScoredStatistic | null> {
  /** Scenes, and cases that have an estimate, and cases that have an estimate with uncertainty. */
  scenes: number
  estimates: number
  uncertainties: number
}

/** The score of the cases whose truth lies in [from, to); null for no limit. */
export interface BinScore extends Score {
  from: number | null
  to: number | null
}

/** How the intervals are drawn. */
export interface Bootstrap {
  /** Whole number from 0 to 2^32 - 1. */
  seed: number
  resamples: number
}
