/** Bins of equal population where the user names no limits (common practice, no source). */
const BINS = 4

/**
 * Limits between bins of about equally many cases: the quartiles of the truth, linear between the values on either
 * side (type 7 of Hyndman and Fan 1996, from memory). Ties may leave fewer bins, down to one for equal truths.
 *
 * @return increasing limits in the unit of the quantity, each above the least truth
 */
export function truthCuts(truth: Float64Array): number[] {
  if (truth.length === 0) return []
  const sorted = truth.toSorted()
  const quantile = (share: number) => {
    const place = share * (sorted.length - 1)
    const below = Math.floor(place)
    const above = Math.min(below + 1, sorted.length - 1)
    return sorted[below] + (place - below) * (sorted[above] - sorted[below])
  }
  const cuts = Array.from({ length: BINS - 1 }, (_, i) => quantile((i + 1) / BINS))
  return [...new Set(cuts)].filter((cut) => cut > sorted[0])
}
