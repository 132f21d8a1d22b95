import type { Column, Snapshot } from '../../src/model/simulate.ts'
import { columnTotals } from '../../src/model/state/columnTotals.ts'
import { NUCLEUS_ACCOUNTS, WATER_ACCOUNTS } from '../../src/model/state/layout.ts'

/**
 * The largest part of water, and of any nucleus class, that the accounts of a run leave unexplained, over the larger
 * of the initial column and the cumulative throughput (the sum of all changes of all accounts, without sign).
 */
export function budgetResiduals(column: Column, states: readonly Snapshot[]) {
  const { layout } = column
  const members = Array.from({ length: layout.nucleusClasses }, (_, j) => j)
  const water = residual(
    states.map(({ y }) => {
      const { vapour, ice } = columnTotals(y, column)
      return {
        total: vapour + ice,
        accounts: WATER_ACCOUNTS.map((name) => y[layout.waterAccount[name]]),
      }
    }),
  )
  const nuclei = members.map((j) =>
    residual(
      states.map(({ y }) => ({
        total: columnTotals(y, column).nuclei[j],
        accounts: NUCLEUS_ACCOUNTS.map((name) => y[layout.nucleusAccount[name] + j]),
      })),
    ),
  )
  return { water, nuclei: Math.max(...nuclei) }
}

interface Entry {
  total: number
  accounts: number[]
}

function residual(entries: readonly Entry[]): number {
  const sum = (values: number[]) => values.reduce((total, value) => total + value, 0)
  const first = entries[0]
  const constant = first.total - sum(first.accounts)
  let throughput = 0
  let worst = 0
  entries.forEach(({ total, accounts }, i) => {
    const before = entries[Math.max(i - 1, 0)].accounts
    throughput += sum(accounts.map((amount, a) => Math.abs(amount - before[a])))
    const scale = Math.max(first.total, throughput)
    worst = Math.max(worst, Math.abs(total - sum(accounts) - constant) / scale)
  })
  return worst
}
