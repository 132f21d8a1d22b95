import type { SceneMatch } from './matchScenes.ts'
import type { Cases } from './types.ts'

/** One quantity by row of the two tables, in its own unit; NaN where there is none. */
export interface QuantityColumns {
  truth: Float64Array
  estimate: Float64Array
  uncertainty: Float64Array
}

/** The pairs of one quantity that can be scored: those that have a truth, with or without an estimate. */
export function pairedCases(
  { pairs }: Pick<SceneMatch, 'pairs'>,
  { truth, estimate, uncertainty }: QuantityColumns,
): Cases {
  const known = pairs.filter(({ truthRow }) => !Number.isNaN(truth[truthRow]))
  const numbers = new Map<number, number>()
  const scene = Int32Array.from(known, ({ truthRow }) => {
    const number = numbers.get(truthRow) ?? numbers.size
    numbers.set(truthRow, number)
    return number
  })
  return {
    scene,
    scenes: numbers.size,
    truth: Float64Array.from(known, ({ truthRow }) => truth[truthRow]),
    estimate: Float64Array.from(known, ({ estimateRow }) => estimate[estimateRow]),
    uncertainty: Float64Array.from(known, ({ estimateRow }) => uncertainty[estimateRow]),
  }
}
