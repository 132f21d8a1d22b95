import { NO_ICE } from '../noIce.ts'
import type { Situation } from './situation.ts'

/**
 * Share of each nucleus class in the cores of a level; that of the background where there is no ice. Negative numbers,
 * which the solver leaves within its tolerance, count as none, so that every share lies between 0 and 1.
 */
export function coreMix({ column, y }: Situation, level: number): number[] {
  const { layout, scenario } = column
  const first = layout.cores + level * layout.nucleusClasses
  const cores = Array.from(y.subarray(first, first + layout.nucleusClasses), (number) =>
    Math.max(number, 0),
  )
  const all = cores.reduce((sum, number) => sum + number, 0)
  return all > NO_ICE
    ? cores.map((number) => number / all)
    : scenario.background.nucleusClasses.map(({ share }) => share)
}
