import { afterAll, describe, expect, it } from 'vitest'
import { type Column, type Snapshot, simulate } from '../../src/model/simulate.ts'
import { HOUR } from '../../src/model/units.ts'
import { budgetResiduals } from '../support/budgetResidual.ts'
import { negativeIceShare } from '../support/negativeIce.ts'
import { printTable } from './printTable.ts'
import { shippedColumn, shippedScenarios } from './shipped.ts'

const rows: Record<string, string | number>[] = []

function account(column: Column) {
  const states: Snapshot[] = []
  let [steps, negativeIce] = [0, 0]
  for (const event of simulate(column)) {
    if (event.kind === 'state') states.push(event.snapshot)
    else {
      steps++
      negativeIce = Math.max(negativeIce, negativeIceShare(column, event.y))
    }
  }
  return { states, steps, negativeIce, ...budgetResiduals(column, states) }
}

describe('every shipped scenario at full length', () => {
  afterAll(() => printTable('Largest residuals and negative ice', rows))

  it.each(shippedScenarios)(
    '%s conserves water and nuclei and has next to no negative ice',
    (name) => {
      const column = shippedColumn(name)
      const { states, steps, negativeIce, water, nuclei } = account(column)
      const hours = column.scenario.duration_s / HOUR
      rows.push({ scenario: name, hours, steps, water, nuclei, negativeIce })
      expect(states.at(-1)?.time_s).toBe(column.scenario.duration_s)
      // Rounding alone, over the larger of the initial column and the cumulative throughput.
      expect(water).toBeLessThan(1e-12)
      expect(nuclei).toBeLessThan(1e-12)
      // A share of the water of the column at every accepted step: far below what any output shows.
      expect(negativeIce).toBeLessThan(1e-9)
    },
  )
})
