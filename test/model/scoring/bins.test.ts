import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { binsOfTruth } from '../../../src/model/scoring/binsOfTruth.ts'
import { scoreCases } from '../../../src/model/scoring/scoreCases.ts'
import { scoreQuantity } from '../../../src/model/scoring/scoreQuantity.ts'
import { truthCuts } from '../../../src/model/scoring/truthCuts.ts'
import { casesOf } from './casesOf.ts'

const CHOICES = { seed: 1, resamples: 50, threshold: null, cuts: null }

describe('bins of truth', () => {
  it('take their lower limit in and leave their upper one out', () => {
    const cases = casesOf([
      [1, 10],
      [2, 20],
      [3, 30],
      [0, 40],
    ])
    const bins = binsOfTruth(cases, [1, 3])
    expect(bins.map(({ from, to }) => [from, to])).toEqual([
      [null, 1],
      [1, 3],
      [3, null],
    ])
    expect(bins.map((bin) => [...bin.cases.estimate])).toEqual([[40], [10, 20], [30]])
    expect(bins.map((bin) => bin.cases.scenes)).toEqual([1, 2, 1])
    expect(bins.map((bin) => [...bin.cases.scene])).toEqual([[0], [0, 1], [0]])
  })

  it('are the quartiles where nothing is said: 2, 3, 4 of 1 to 5', () => {
    expect(truthCuts(Float64Array.of(5, 1, 4, 2, 3))).toEqual([2, 3, 4])
    expect(truthCuts(Float64Array.of(1, 2))).toEqual([1.25, 1.5, 1.75])
  })

  it('are fewer where truths are equal, so that none is empty for want of a lower truth', () => {
    expect(truthCuts(Float64Array.of(0, 0, 0, 0, 0, 8))).toEqual([])
    expect(truthCuts(Float64Array.of(0, 0, 0, 4, 8))).toEqual([4])
    expect(truthCuts(new Float64Array(0))).toEqual([])
  })

  it('hold every case exactly once', () => {
    const value = fc.integer({ min: -5, max: 5 })
    fc.assert(
      fc.property(
        fc.array(fc.tuple(value, value), { minLength: 1, maxLength: 30 }),
        fc.uniqueArray(value, { maxLength: 4 }),
        (rows, limits) => {
          const bins = binsOfTruth(
            casesOf(rows),
            limits.toSorted((a, b) => a - b),
          )
          const truths = bins.flatMap((bin) => [...bin.cases.truth])
          expect(truths.toSorted()).toEqual(rows.map(([truth]) => truth).toSorted())
        },
      ),
      { seed: 21 },
    )
  })

  it('score what is in them as if it were alone', () => {
    const rows = [
      [1, 2],
      [2, 2],
      [3, 5],
      [4, 3],
    ] as const
    const { overall, bins } = scoreQuantity(casesOf(rows), { ...CHOICES, cuts: [3] })
    expect(overall.bias?.value).toBe(0.5)
    expect(bins[0]).toEqual({
      from: null,
      to: 3,
      ...scoreCases(casesOf(rows.slice(0, 2)), null, CHOICES),
    })
    expect(bins[1].bias?.value).toBe(0.5)
  })

  it('that are empty have no statistics', () => {
    const { bins } = scoreQuantity(casesOf([[1, 2]]), { ...CHOICES, cuts: [5] })
    expect(bins[1]).toMatchObject({ scenes: 0, estimates: 0, bias: null, hitRate: null })
  })
})
