import { describe, expect, it } from 'vitest'
import {
  type ConvergenceRow,
  convergenceTable,
  planConvergence,
} from '../../../src/model/experiments/convergence.ts'
import type { MemberOutcome } from '../../../src/model/experiments/runMember.ts'
import { refusalOf, run, tinyNight } from './tinyNight.ts'

const night = tinyNight()
const plan = planConvergence(night)

type Values = (number | null)[]

function done(value: number | null): MemberOutcome {
  return {
    status: 'done',
    headlines: { time_h: [], series: [] },
    diagnostics: { y: value },
    warnings: [],
    scenes: [],
    solver: { evaluations: 0, acceptedSteps: 0, largestStep_s: 0 },
  }
}

/** Table of invented results: base, levels once and twice, classes once and twice, tolerance once and twice. */
function tableOf(values: Values): ConvergenceRow[] {
  return convergenceTable(plan, values.map(done))
}

describe('the plan of a convergence test', () => {
  it('refines level spacing, class width and tolerance in turn, each twice', () => {
    expect(plan.members.map(({ refinement, step, words }) => [refinement, step, words])).toEqual([
      [null, 0, 'as it stands'],
      ['level spacing', 1, '40 levels'],
      ['level spacing', 2, '80 levels'],
      ['class width', 1, '24 classes'],
      ['class width', 2, '48 classes'],
      ['tolerance', 1, 'tolerances / 10'],
      ['tolerance', 2, 'tolerances / 100'],
    ])
    const [base, levels, , classes, , , tolerance] = plan.members.map(({ document }) => document)
    expect(base).toEqual(night)
    expect(levels).toEqual({ ...night, grid: { ...night.grid, levels: 40 } })
    expect(classes.sizes).toEqual({ ...night.sizes, classes: 24 })
    // The ceiling stays the same in nm/s.
    expect(classes.numerics.sublimation_ceiling_s).toBe(night.numerics.sublimation_ceiling_s / 2)
    expect(tolerance.numerics.relative_tolerance).toBe(night.numerics.relative_tolerance / 100)
  })

  it('is refused for a scenario that cannot be refined twice', () => {
    expect(refusalOf(() => planConvergence(tinyNight({ grid: { levels: 600 } })))).toBe(
      'InputError: the level spacing cannot be refined twice: grid.levels: 2400 is not allowed; allowed: a whole number from 4 to 2000',
    )
  })
})

describe('the table of a convergence test', () => {
  it('finds the order of an error that falls with it, and a bar that covers the error', () => {
    // y = 1 + h^2 in level spacing, 1 + h in class width; a tolerance that falls as its root by 10.
    const error = Math.sqrt(1 / 10)
    const rows = tableOf([2, 1.25, 1.0625, 1.5, 1.25, 1 + error, 1 + error ** 2])
    expect(rows.map(({ refinement, verdict }) => [refinement, verdict])).toEqual([
      ['level spacing', 'converging'],
      ['class width', 'converging'],
      ['tolerance', 'converging'],
      ['together', 'converging'],
    ])
    ;[2, 1, 0.5].forEach((order, i) => {
      expect(rows[i].order).toBeCloseTo(order, 10)
      // The true error is 1; the safety factor is 1.25.
      expect(rows[i].error_bar).toBeCloseTo(1.25, 10)
      expect(rows[i].relative_error_bar).toBeCloseTo(0.625, 10)
    })
    expect(rows[0]).toMatchObject({
      base: 2,
      once: 1.25,
      twice: 1.0625,
      change: -0.75,
      relative_change: -0.375,
    })
    expect(rows[3].error_bar).toBeCloseTo(3.75, 10)
    expect(rows[3].order).toBeNull()
  })

  it.each([
    ['turn around', 1, 1.5, 1.25, 1.5],
    ['grow', 1, 1.5, 2.5, 3],
    ['hardly shrink', 1, 1.5, 1.9, 1.5],
    ['stop at once', 1, 1.5, 1.5, 1.5],
  ])('says not asymptotic where errors %s', (_, base, once, twice, bar) => {
    const [row, , , all] = tableOf([base, once, twice, base, base, base, base])
    expect(row).toMatchObject({ order: null, verdict: 'not asymptotic' })
    // Three times the larger change.
    expect(row.error_bar).toBeCloseTo(bar, 10)
    expect(all).toMatchObject({ verdict: 'not asymptotic' })
  })

  it('says where nothing changes, where there is no cloud, and where a run failed', () => {
    expect(
      tableOf([1, 1, 1, 1, 1, 1, 1]).map(({ verdict, error_bar }) => [verdict, error_bar]),
    ).toEqual(Array.from({ length: 4 }, () => ['unchanged', 0]))
    const dark = tableOf([1, null, 1, 1, 1, 1, 1])
    expect(dark[0]).toMatchObject({ verdict: 'no cloud', error_bar: null, change: null })
    expect(dark[3]).toMatchObject({ verdict: 'no cloud', error_bar: null })
    const outcomes = [1, 1, 1, 1, 1, 1, 1].map(done)
    outcomes[4] = { status: 'failed', reason: 'invented' }
    const failed = convergenceTable(plan, outcomes)
    expect(failed.map(({ verdict }) => verdict)).toEqual([
      'unchanged',
      'failed',
      'unchanged',
      'failed',
    ])
    expect(convergenceTable(plan, [])).toEqual([])
  })

  it('covers every summary number of real runs but what rounding leaves of the budget', () => {
    const outcomes = planConvergence(tinyNight({ duration_h: 1 })).members.map(({ document }) =>
      run(document),
    )
    const rows = convergenceTable(plan, outcomes)
    const names = Object.keys(outcomes[0].diagnostics).filter((name) => !/residual/.test(name))
    expect(names.length).toBeGreaterThan(5)
    expect(rows).toHaveLength(4 * names.length)
    const ice = rows.find(
      ({ diagnostic, refinement }) =>
        diagnostic === 'column_ice_ug_per_m2' && refinement === 'together',
    )
    expect(ice?.base).toBe(outcomes[0].diagnostics.column_ice_ug_per_m2)
    expect(ice?.error_bar).toBeGreaterThan(0)
  })

  it('takes changes at the level of rounding for none, whatever their order', () => {
    const scatter = tableOf([1, 1 + 1e-9, 1 - 1e-9, 1 + 2e-9, 1, 1 - 1e-9, 1 + 1e-8])
    expect(scatter.filter(({ verdict }) => verdict !== 'unchanged')).toEqual([])
  })
})
