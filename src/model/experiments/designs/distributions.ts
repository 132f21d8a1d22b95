import { normalQuantile } from './normalQuantile.ts'

/** A value from a number in [0, 1): the quantile of a distribution. */
export type Quantile<T = number> = (share: number) => T

export function uniform(from: number, to: number): Quantile {
  return (share) => between(from, to, from + (to - from) * share)
}

/** Uniform in the logarithm; both limits above zero. */
export function logUniform(from: number, to: number): Quantile {
  return (share) => between(from, to, from * (to / from) ** share)
}

/** Rounding must not carry a value past its limits, which may be those of a key. */
function between(from: number, to: number, value: number): number {
  return Math.min(Math.max(value, Math.min(from, to)), Math.max(from, to))
}

/** Normal, cut off at two limits. */
export interface TruncatedNormal {
  mean: number
  standard_deviation: number
  from: number
  to: number
}

export function normal({ mean, standard_deviation, from, to }: TruncatedNormal): Quantile {
  const quantile = normalQuantile(
    (from - mean) / standard_deviation,
    (to - mean) / standard_deviation,
  )
  return (share) => between(from, to, mean + standard_deviation * quantile(share))
}

/** Each of some values with the same chance. */
export function list<T>(values: readonly T[]): Quantile<T> {
  return (share) => values[Math.min(Math.floor(share * values.length), values.length - 1)]
}
