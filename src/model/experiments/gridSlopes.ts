import type { MemberResults, SensitivityRow } from './sensitivity.ts'
import { type SlopeScale, slopeScale } from './slopeScale.ts'
import type { StudyPlan } from './study.ts'

/** Members that differ in one axis alone. */
interface Line {
  where: string | null
  /** Indices of its members, one per value of the axis. */
  members: number[]
}

/** The slope along each axis of a grid: line by line, and over all lines where there are several. */
export function gridSlopes(plan: StudyPlan, results: MemberResults): SensitivityRow[] {
  return plan.axes.flatMap(({ key, kind, values }, axis) => {
    const x = (values ?? []).map(Number)
    if (kind !== 'number' || x.length < 2) return []
    const lines = linesAlong(plan, axis)
    const scale = slopeScale(key, x)
    return plan.diagnostics.flatMap((diagnostic) => {
      const rows = lines.map(({ where, members }) => {
        const y = members.map((index) => results[index]?.[diagnostic] ?? null)
        return { ...slopeOf(x, y, scale), measure: 'slope' as const, axis: key, diagnostic, where }
      })
      return lines.length === 1 ? rows : [overall(rows), ...rows]
    })
  })
}

function linesAlong(plan: StudyPlan, axis: number): Line[] {
  if (plan.design.kind !== 'grid') throw new Error('only a grid has lines')
  const { lengths } = plan.design
  const stride = lengths.slice(axis + 1).reduce((product, length) => product * length, 1)
  const lines: Line[] = []
  for (let first = 0; first < plan.memberCount; first++) {
    if (Math.floor(first / stride) % lengths[axis] !== 0) continue
    const values = plan.values(first)
    const others = plan.axes.flatMap(({ key }, i) => (i === axis ? [] : [`${key} = ${values[i]}`]))
    lines.push({
      where: others.length === 0 ? null : others.join(', '),
      members: Array.from({ length: lengths[axis] }, (_, position) => first + position * stride),
    })
  }
  return lines
}

type Slope = Pick<SensitivityRow, 'value' | 'low' | 'high' | 'unit' | 'used' | 'left_out'>

/** Slope of the straight line of least squares through ln y, and the least and greatest between neighbours. */
function slopeOf(x: readonly number[], y: readonly (number | null)[], scale: SlopeScale): Slope {
  const points = x
    .flatMap((value, i) => {
      const result = y[i]
      return result !== null && result > 0 ? [{ x: scale.of(value), y: Math.log(result) }] : []
    })
    .sort((left, right) => left.x - right.x)
  const counts = { unit: scale.unit, used: points.length, left_out: x.length - points.length }
  if (points.length < 2) return { value: null, low: null, high: null, ...counts }
  const local = points.slice(1).map((to, i) => (to.y - points[i].y) / (to.x - points[i].x))
  return {
    value: leastSquares(points),
    low: Math.min(...local),
    high: Math.max(...local),
    ...counts,
  }
}

function leastSquares(points: readonly { x: number; y: number }[]): number {
  const mean = (key: 'x' | 'y') =>
    points.reduce((sum, point) => sum + point[key], 0) / points.length
  const [x, y] = [mean('x'), mean('y')]
  const covariance = points.reduce((sum, point) => sum + (point.x - x) * (point.y - y), 0)
  return covariance / points.reduce((sum, point) => sum + (point.x - x) ** 2, 0)
}

/** Mean of the slopes of all lines that have one. */
function overall(rows: readonly SensitivityRow[]): SensitivityRow {
  const sloped = rows.filter(({ value }) => value !== null)
  const numbers = (key: 'value' | 'low' | 'high') => sloped.map((row) => row[key] as number)
  const sum = (key: 'used' | 'left_out') => rows.reduce((total, row) => total + row[key], 0)
  const isEmpty = sloped.length === 0
  return {
    ...rows[0],
    where: null,
    value: isEmpty ? null : numbers('value').reduce((a, b) => a + b, 0) / sloped.length,
    low: isEmpty ? null : numbers('low').reduce((a, b) => Math.min(a, b)),
    high: isEmpty ? null : numbers('high').reduce((a, b) => Math.max(a, b)),
    used: sum('used'),
    left_out: sum('left_out'),
  }
}
