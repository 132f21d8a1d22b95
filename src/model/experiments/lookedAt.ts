import type { Look } from './responseMapPlan.ts'

/** Output times may differ by rounding. */
const SAME_TIME_H = 1e-9

/** Indices of the output times at which the brightness is looked at. */
export function lookedAt(times_h: readonly number[], when: Look): number[] {
  const [from, to] = 'at_h' in when ? [when.at_h, when.at_h] : when.mean_h
  return times_h.flatMap((time, i) =>
    time >= from - SAME_TIME_H && time <= to + SAME_TIME_H ? [i] : [],
  )
}
