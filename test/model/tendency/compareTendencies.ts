import type { Column } from '../../../src/model/state/column.ts'
import type { StateLayout } from '../../../src/model/state/layout.ts'
import type { Tendency } from '../../../src/model/tendency/tendency.ts'

/** dy/dt of a tendency at one instant of a run, in an array that starts out as nonsense. */
export function evaluated(
  tendency: Tendency,
  column: Column,
  { time_s, y }: { time_s: number; y: readonly number[] },
): number[] {
  const dy = new Array<number>(y.length).fill(12345)
  tendency.enter(column.atmosphere.basis(0), { from_s: time_s - 500, to_s: time_s + 500 })
  tendency.evaluate(time_s, y, dy)
  return dy
}

/**
 * Differences below this count as none, 1/(m3 s): the fast form leaves out ice below 1e-8 per m3, which the reference
 * keeps, and nothing moves faster than a tenth of a class or cell per second.
 */
const NOTHING = 1e-9

/** Largest difference over largest tendency, for each quantity and account of the column. */
export function relativeDifferences(
  { layout }: Column,
  actual: readonly number[],
  expected: readonly number[],
): Record<string, number> {
  const worst: Record<string, number> = {}
  for (const [name, indices] of Object.entries(quantities(layout))) {
    const largest = Math.max(...indices.map((index) => Math.abs(expected[index])))
    const difference = Math.max(
      ...indices.map((index) => Math.abs(actual[index] - expected[index])),
    )
    worst[name] = difference < NOTHING ? 0 : difference / largest
  }
  return worst
}

function quantities(layout: StateLayout): Record<string, number[]> {
  const { levels, classes, nucleusClasses, waterAccount, nucleusAccount } = layout
  const rows = (start: number, width: number, members: number[]) =>
    Array.from({ length: levels }, (_, level) =>
      members.map((m) => start + level * width + m),
    ).flat()
  const named: Record<string, number[]> = {
    vapour: rows(layout.vapour, 1, [0]),
    ice: rows(
      layout.ice,
      classes,
      Array.from({ length: classes }, (_, k) => k),
    ),
  }
  for (const [account, index] of Object.entries(waterAccount)) named[`water ${account}`] = [index]
  for (let j = 0; j < nucleusClasses; j++) {
    named[`nuclei ${j}`] = rows(layout.nuclei, nucleusClasses, [j])
    named[`cores ${j}`] = rows(layout.cores, nucleusClasses, [j])
    for (const [account, index] of Object.entries(nucleusAccount)) {
      named[`nuclei ${j} ${account}`] = [index + j]
    }
  }
  return named
}
