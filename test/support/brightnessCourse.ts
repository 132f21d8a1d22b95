import { diagnose } from '../../src/model/diagnostics/diagnose.ts'
import { type Column, simulate } from '../../src/model/simulate.ts'
import { HOUR } from '../../src/model/units.ts'

/** What an observer sees of a column in its last six hours, one value per output time. */
export interface Course {
  time_s: number[]
  /** Directional albedo of the first channel, Rayleigh, 1/sr. */
  brightness: number[]
  /** ug/m2 */
  columnIce: number[]
}

export function lastSixHours(column: Column): Course {
  const course: Course = { time_s: [], brightness: [], columnIce: [] }
  // A second less, for times that are sums of output intervals.
  const from_s = column.scenario.duration_s - 6 * HOUR - 1
  for (const event of simulate(column)) {
    if (event.kind !== 'state' || event.snapshot.time_s < from_s) continue
    const { time_s, brightness, budget } = diagnose(column, event.snapshot)
    course.time_s.push(time_s)
    course.brightness.push(brightness.albedo_per_sr[0] as number)
    course.columnIce.push(budget.column_ice_ug_per_m2)
  }
  return course
}

export function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length
}

/** How far the mean of a course, and its single values at their worst, lie from another's, over the other's mean. */
export interface Difference {
  mean: number
  worst: number
}

/** Differences of `course` from `reference` at the output times that both have. */
export function difference(
  course: Course,
  reference: Course,
  quantity: 'brightness' | 'columnIce',
): Difference {
  const pairs = course.time_s.flatMap((time_s, i) => {
    const j = reference.time_s.indexOf(time_s)
    return j < 0 ? [] : [[course[quantity][i], reference[quantity][j]]]
  })
  if (pairs.length < 2) throw new Error('the courses have hardly an output time in common')
  const scale = mean(pairs.map(([, value]) => value))
  return {
    mean: mean(pairs.map(([value]) => value)) / scale - 1,
    worst: Math.max(...pairs.map(([value, other]) => Math.abs(value - other))) / scale,
  }
}
