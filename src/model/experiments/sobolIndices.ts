import { randomStream } from '../numerics/random.ts'

/** Results at the points of a Saltelli design. */
export interface SaltelliResults {
  a: ArrayLike<number>
  b: ArrayLike<number>
  /** One per input: A with that coordinate from B. */
  mixed: readonly ArrayLike<number>[]
}

export interface IndexEstimate {
  value: number
  /** 95 % bootstrap interval. */
  low: number
  high: number
}

/** One estimate per input; null where the results do not vary. */
export interface SobolIndices {
  firstOrder: (IndexEstimate | null)[]
  total: (IndexEstimate | null)[]
}

/** How the intervals are drawn. */
export interface Bootstrap {
  seed: number
  resamples?: number
}

const RESAMPLES = 500
const CONFIDENCE = 0.95
/** Results that vary by less than this share do not vary. */
const ROUNDING = 1e-12

/**
 * Share of the variance that an input explains alone (first order) and with all its interactions (total):
 *   S_i = mean of f(B)(f(AB_i) - f(A)) / V        (Saltelli et al. 2010)
 *   T_i = mean of (f(A) - f(AB_i))^2 / (2 V)      (Jansen 1999)
 * with V the variance of f over A and B; f is taken from its mean, which leaves S_i unchanged and its error smaller.
 * Both from memory. Intervals by resampling the blocks (Efron's percentile bootstrap, common practice).
 */
export function sobolIndices(
  results: SaltelliResults,
  { seed, resamples = RESAMPLES }: Bootstrap,
): SobolIndices {
  const count = results.a.length
  const everything = Uint32Array.from({ length: count }, (_, i) => i)
  const values = estimate(results, everything)
  if (values === null) {
    const none = results.mixed.map(() => null)
    return { firstOrder: none, total: none }
  }
  const { uniform } = randomStream(seed)
  const draws = Array.from({ length: resamples }, () =>
    estimate(
      results,
      everything.map(() => Math.floor(uniform() * count)),
    ),
  ).filter((draw) => draw !== null)
  const withInterval = (order: 'firstOrder' | 'total') =>
    values[order].map((value, i) => ({ value, ...interval(draws.map((draw) => draw[order][i])) }))
  return { firstOrder: withInterval('firstOrder'), total: withInterval('total') }
}

function estimate(
  { a, b, mixed }: SaltelliResults,
  blocks: Uint32Array,
): { firstOrder: number[]; total: number[] } | null {
  const { length } = blocks
  let sum = 0
  for (const j of blocks) sum += a[j] + b[j]
  const mean = sum / (2 * length)
  let squares = 0
  for (const j of blocks) squares += (a[j] - mean) ** 2 + (b[j] - mean) ** 2
  const variance = squares / (2 * length)
  if (!(variance > (ROUNDING * mean) ** 2)) return null
  const firstOrder = mixed.map((values) => {
    let covariance = 0
    for (const j of blocks) covariance += (b[j] - mean) * (values[j] - a[j])
    return covariance / length / variance
  })
  const total = mixed.map((values) => {
    let difference = 0
    for (const j of blocks) difference += (a[j] - values[j]) ** 2
    return difference / (2 * length) / variance
  })
  return { firstOrder, total }
}

function interval(draws: readonly number[]): { low: number; high: number } {
  const sorted = draws.toSorted((x, y) => x - y)
  const at = (share: number) => sorted[Math.round(share * (sorted.length - 1))]
  return { low: at((1 - CONFIDENCE) / 2), high: at((1 + CONFIDENCE) / 2) }
}
