/** Chance that an interval is meant to hold the value (common practice, no source). */
export const CONFIDENCE = 0.95

/** Ends of the middle 95 % of resampled values, the nearest value each (Efron's percentile bootstrap, common practice). */
export function percentileInterval(draws: readonly number[]): { low: number; high: number } {
  const sorted = draws.toSorted((x, y) => x - y)
  const at = (share: number) => sorted[Math.round(share * (sorted.length - 1))]
  return { low: at((1 - CONFIDENCE) / 2), high: at((1 + CONFIDENCE) / 2) }
}
