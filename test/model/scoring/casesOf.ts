import type { Cases } from '../../../src/model/scoring/types.ts'

/** One scene per truth, estimate and uncertainty (NaN for none). */
export function casesOf(rows: readonly (readonly [number, number, number?])[]): Cases {
  return {
    scene: Int32Array.from(rows.keys()),
    scenes: rows.length,
    truth: Float64Array.from(rows, ([truth]) => truth),
    estimate: Float64Array.from(rows, ([, estimate]) => estimate),
    uncertainty: Float64Array.from(rows, ([, , uncertainty]) => uncertainty ?? Number.NaN),
  }
}
