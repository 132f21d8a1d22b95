import type { MemberResults, SensitivityRow } from './sensitivity.ts'
import { slopeScale } from './slopeScale.ts'
import type { StudyPlan } from './study.ts'

/**
 * Slopes of the plane of least squares ln y = a + sum of s_i x_i through all members with a cloud, each x_i in the scale
 * of its axis.
 */
export function jointSlopes(plan: StudyPlan, results: MemberResults): SensitivityRow[] {
  const members = Array.from({ length: plan.memberCount }, (_, index) => plan.values(index))
  const inputs = plan.axes.flatMap(({ key, kind }, axis) => {
    if (kind !== 'number') return []
    const values = members.map((member) => Number(member[axis]))
    const scale = slopeScale(key, values)
    return [{ key, unit: scale.unit, x: values.map(scale.of) }]
  })
  return plan.diagnostics.flatMap((diagnostic) => {
    const logs = results.map((member) => Math.log(member?.[diagnostic] ?? Number.NaN))
    const usable = logs.flatMap((log, index) => (Number.isFinite(log) ? [index] : []))
    const pick = (values: readonly number[]) => deviations(usable.map((index) => values[index]))
    const slopes = planeOfLeastSquares(
      inputs.map(({ x }) => pick(x)),
      pick(logs),
    )
    return inputs.map(
      ({ key, unit }, i): SensitivityRow => ({
        measure: 'joint slope',
        axis: key,
        diagnostic,
        where: null,
        value: slopes?.[i] ?? null,
        low: null,
        high: null,
        unit,
        used: usable.length,
        left_out: plan.memberCount - usable.length,
      }),
    )
  })
}

function deviations(values: readonly number[]): number[] {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length
  return values.map((value) => value - mean)
}

/** A pivot below this share of its column is rounding. */
const SINGULAR = 1e-10

/** Solves the normal equations by elimination, diagonal pivots; null when the inputs do not determine the slopes. */
function planeOfLeastSquares(
  x: readonly (readonly number[])[],
  y: readonly number[],
): number[] | null {
  const product = (left: readonly number[], right: readonly number[]) =>
    left.reduce((sum, value, i) => sum + value * right[i], 0)
  const rows = x.map((left) => [...x.map((right) => product(left, right)), product(left, y)])
  const sizes = rows.map((row, i) => row[i])
  for (const [i, row] of rows.entries()) {
    if (!(row[i] > SINGULAR * sizes[i])) return null
    for (const [j, other] of rows.entries()) {
      if (j === i) continue
      const share = other[i] / row[i]
      for (let k = i; k < other.length; k++) other[k] -= share * row[k]
    }
  }
  return rows.map((row, i) => row[x.length] / row[i])
}
