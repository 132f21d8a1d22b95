import { describe, expect, it } from 'vitest'
import { randomStream } from '../../../src/model/numerics/random.ts'
import { resolve } from '../../../src/model/scenario/resolve.ts'
import type { ScenarioInput } from '../../../src/model/scenario/schema.ts'
import { initialSnapshot, prepareColumn, simulate } from '../../../src/model/simulate.ts'
import { makeReferenceTendency } from '../../../src/model/tendency/reference/referenceTendency.ts'
import { makeTendency, type Tendency } from '../../../src/model/tendency/tendency.ts'
import { evaluated, relativeDifferences } from './compareTendencies.ts'
import { type RandomCase, randomCase } from './randomColumn.ts'

/**
 * Far below the solver's relative tolerance of 1e-3. The forms differ by rounding, by the cubic rest of the Kelvin
 * table (2e-10 of the factor at 1 nm) and by the rest of the fall speed series (1e-10).
 */
const AGREEMENT = 1e-9

function worstDifference({ column, time_s, y }: RandomCase): { name: string; difference: number } {
  const fast = evaluated(makeTendency(column), column, { time_s, y })
  const plain = evaluated(makeReferenceTendency(column), column, { time_s, y })
  return Object.entries(relativeDifferences(column, fast, plain)).reduce(
    (worst, [name, difference]) => (difference > worst.difference ? { name, difference } : worst),
    { name: 'none', difference: 0 },
  )
}

/** The last state of a short run. */
function runState(document: ScenarioInput): RandomCase {
  const column = prepareColumn(resolve(document).scenario)
  let last = initialSnapshot(column)
  for (const event of simulate(column)) if (event.kind === 'state') last = event.snapshot
  return { column, time_s: last.time_s, y: Array.from(last.y) }
}

describe('makeTendency', () => {
  it('agrees with the reference on 200 random states', () => {
    const random = randomStream(20)
    for (let trial = 0; trial < 200; trial++) {
      const { name, difference } = worstDifference(randomCase(random))
      expect(difference, `${name}, trial ${trial}`).toBeLessThan(AGREEMENT)
    }
  })

  const small = { grid: { levels: 60 }, sizes: { classes: 24 }, output_every_min: 60 }
  const wave = { amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10, at_km: 83 }
  const heat = {
    quantity: 'temperature' as const,
    add_K: 12,
    time: { shape: 'step' as const, start_h: 5.9 },
  }
  it.each([
    ['of a mature quiet night', { ...small, duration_h: 8 }],
    ['under a wave', { ...small, duration_h: 3, waves: [wave] }],
    ['of a cloud that sublimates', { ...small, duration_h: 6, perturbations: [heat] }],
  ])('agrees with the reference in the run state %s', (_, document) => {
    const { name, difference } = worstDifference(runState(document))
    expect(difference, name).toBeLessThan(AGREEMENT)
  })

  it('never writes to the state', () => {
    const random = randomStream(21)
    for (let trial = 0; trial < 20; trial++) {
      const { column, time_s, y } = randomCase(random)
      const frozen = Object.freeze(y.slice())
      evaluated(makeTendency(column), column, { time_s, y: frozen })
      expect(frozen).toEqual(y)
    }
  })

  it('carries nothing over from one state to the next', () => {
    const random = randomStream(22)
    for (let trial = 0; trial < 20; trial++) {
      const { column, time_s, y } = randomCase(random)
      const bare = y.map((value, index) => (index < column.layout.ice ? value : 0))
      const partly = y.map((value, index) => (index % 7 === trial % 7 ? value : 0))
      const used = makeTendency(column)
      for (const state of [y, bare, partly, y, partly]) {
        const again = evaluated(used, column, { time_s, y: state })
        expect(again).toEqual(evaluated(makeTendency(column), column, { time_s, y: state }))
      }
    }
  })

  it('comes back to an earlier instant under waves with the same result', () => {
    const column = prepareColumn(resolve({ ...small, waves: [wave] }).scenario)
    const { y } = initialSnapshot(column)
    const basis = column.atmosphere.basis(0)
    const interval = { from_s: 3600, to_s: 7200 }
    const at = (tendency: Tendency, time_s: number) => {
      const dy = new Array<number>(y.length).fill(0)
      tendency.evaluate(time_s, y, dy)
      return dy
    }
    const used = makeTendency(column)
    used.enter(basis, interval)
    for (const time_s of [4000, 4100, 4050, 4000, 4075, 4025, 4100, 4200, 4000]) {
      const fresh = makeTendency(column)
      fresh.enter(basis, interval)
      expect(at(used, time_s), `${time_s} s`).toEqual(at(fresh, time_s))
    }
  })
})
