import { NO_ICE } from '../noIce.ts'
import type { Situation } from './situation.ts'

/** Share of each nucleus class in the cores of a level; that of the background where there is no ice. */
export function coreMix({ column, y }: Situation, level: number): number[] {
  const { layout, scenario } = column
  const first = layout.cores + level * layout.nucleusClasses
  const cores = Array.from(y.subarray(first, first + layout.nucleusClasses))
  const all = cores.reduce((sum, number) => sum + number, 0)
  return all > NO_ICE
    ? cores.map((number) => number / all)
    : scenario.background.nucleusClasses.map(({ share }) => share)
}
