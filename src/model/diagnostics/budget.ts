import type { Scenario } from '../scenario/types.ts'
import type { Column } from '../state/column.ts'
import { type ColumnTotals, columnTotals } from '../state/columnTotals.ts'
import { totalsAtStart } from '../state/initialState.ts'
import { NUCLEUS_ACCOUNTS, WATER_ACCOUNTS } from '../state/layout.ts'
import { HOUR, MICROGRAM } from '../units.ts'
import { iceWaterContent } from './profileVariables.ts'
import { type Computed, describe, type Variable, variable } from './variables.ts'
import type { View } from './view.ts'

/** The account of a column at one time. */
interface Account {
  view: View
  now: ColumnTotals
  initial: ColumnTotals
}

type BudgetVariable = Computed<Account, number>

const ACCOUNT_NAMES: Record<string, string> = {
  top: 'through the top',
  bottom: 'through the bottom',
  fallout: 'fallen out of the bottom as ice',
  lateral: 'brought by the convergence of the mean wind',
  photolysis: 'lost to photolysis',
  rebasing: 'by re-basing the air density',
  injection: 'by perturbations',
}

/** The variables of `budget.arrow`: amounts per unit area of resting air, accounts positive into the column. */
export function budgetVariables(scenario: Scenario): Variable[] {
  return computedBudget(scenario).map(describe)
}

export function computedBudget(scenario: Scenario): BudgetVariable[] {
  return [...waterBudget, ...scenario.background.nucleusClasses.flatMap((_, j) => nucleusBudget(j))]
}

const waterBudget: BudgetVariable[] = [
  {
    ...variable('time_h', 'time since the start of the run', 'h', 'time'),
    compute: ({ view }) => view.moment.time_s / HOUR,
  },
  {
    ...variable(
      'column_ice_ug_per_m2',
      'mass of ice over true area, as an observer counts it',
      'ug m-2',
    ),
    compute: ({ view }) => columnIce(view) / MICROGRAM,
  },
  {
    ...variable('vapour_per_m2', 'water molecules in vapour', 'm-2'),
    compute: ({ now }) => now.vapour,
  },
  { ...variable('ice_per_m2', 'water molecules in ice', 'm-2'), compute: ({ now }) => now.ice },
  {
    ...variable('water_per_m2', 'water molecules, vapour and ice', 'm-2'),
    compute: ({ now }) => now.vapour + now.ice,
  },
  ...WATER_ACCOUNTS.map(
    (account): BudgetVariable => ({
      ...variable(`water_${account}_per_m2`, `water molecules ${ACCOUNT_NAMES[account]}`, 'm-2'),
      compute: ({ view }) => view.moment.y[view.column.layout.waterAccount[account]],
    }),
  ),
  {
    ...variable(
      'water_residual',
      'water not accounted for, over the larger of column and throughput',
      '1',
    ),
    compute: (account) =>
      residual(
        account.now.vapour + account.now.ice,
        account.initial.vapour + account.initial.ice,
        WATER_ACCOUNTS.map(
          (name) => account.view.moment.y[account.view.column.layout.waterAccount[name]],
        ),
      ),
  },
]

function nucleusBudget(j: number): BudgetVariable[] {
  const of = `nuclei_${j + 1}`
  const booked = ({ view }: Account) =>
    NUCLEUS_ACCOUNTS.map((name) => view.moment.y[view.column.layout.nucleusAccount[name] + j])
  return [
    {
      ...variable(`${of}_per_m2`, `nuclei of class ${j + 1}, free and in ice`, 'm-2'),
      compute: ({ now }) => now.nuclei[j],
    },
    ...NUCLEUS_ACCOUNTS.map(
      (account, place): BudgetVariable => ({
        ...variable(
          `${of}_${account}_per_m2`,
          `nuclei of class ${j + 1} ${ACCOUNT_NAMES[account]}`,
          'm-2',
        ),
        compute: (it) => booked(it)[place],
      }),
    ),
    {
      ...variable(
        `${of}_residual`,
        `nuclei of class ${j + 1} not accounted for, over the larger of column and throughput`,
        '1',
      ),
      compute: (it) => residual(it.now.nuclei[j], it.initial.nuclei[j], booked(it)),
    },
  ]
}

function residual(now: number, initial: number, accounts: readonly number[]): number {
  const entered = accounts.reduce((sum, amount) => sum + amount, 0)
  const throughput = accounts.reduce((sum, amount) => sum + Math.abs(amount), 0)
  const scale = Math.max(initial, throughput)
  return scale === 0 ? 0 : (now - entered - initial) / scale
}

/** Mass of ice per unit true area, kg/m2. */
export function columnIce(view: View): number {
  let mass = 0
  for (let i = 0; i < view.thickness_m.length; i++) {
    mass += iceWaterContent(view, i) * view.thickness_m[i]
  }
  return mass
}

/** Totals at the start of the run, worked out once per column. */
const startOf = new WeakMap<Column, ColumnTotals>()

function initialTotals(column: Column): ColumnTotals {
  const known = startOf.get(column) ?? totalsAtStart(column)
  startOf.set(column, known)
  return known
}

export function budget(view: View): Record<string, number> {
  const { column, moment } = view
  const account = { view, now: columnTotals(moment.y, column), initial: initialTotals(column) }
  return Object.fromEntries(
    computedBudget(column.scenario).map(({ name, compute }) => [name, compute(account)]),
  )
}
