import type { Cases } from './types.ts'

/** The cases whose truth lies in [from, to); null for no limit. */
export interface TruthBin {
  from: number | null
  to: number | null
  cases: Cases
}

/**
 * Every case in exactly one bin: below the first cut, between cuts, from the last cut on.
 *
 * @param cuts increasing, in the unit of the quantity
 */
export function binsOfTruth(cases: Cases, cuts: readonly number[]): TruthBin[] {
  const limits = [null, ...cuts, null]
  return limits.slice(1).map((to, i) => {
    const from = limits[i]
    const isInside = (value: number) => value >= (from ?? -Infinity) && value < (to ?? Infinity)
    return { from, to, cases: pickedCases(cases, isInside) }
  })
}

function pickedCases(cases: Cases, isPicked: (truth: number) => boolean): Cases {
  const picked = Int32Array.from(cases.truth.keys()).filter((i) => isPicked(cases.truth[i]))
  const pick = (values: Float64Array) => Float64Array.from(picked, (i) => values[i])
  // The scenes that remain are numbered anew, in the order in which they come.
  const numbers = new Map<number, number>()
  const scene = picked.map((i) => {
    const old = cases.scene[i]
    const number = numbers.get(old) ?? numbers.size
    numbers.set(old, number)
    return number
  })
  return {
    scene,
    scenes: numbers.size,
    truth: pick(cases.truth),
    estimate: pick(cases.estimate),
    uncertainty: pick(cases.uncertainty),
  }
}
