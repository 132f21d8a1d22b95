import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { coverage, isWithin } from '../../../src/model/scoring/coverage.ts'
import { detectionRates } from '../../../src/model/scoring/detectionRates.ts'
import { errorMoments } from '../../../src/model/scoring/errorMoments.ts'
import {
  byAbsoluteError,
  medianAbsoluteError,
} from '../../../src/model/scoring/medianAbsoluteError.ts'
import type { Cases, Weights } from '../../../src/model/scoring/types.ts'
import { casesOf } from './casesOf.ts'

/** Rounding of sums of a few terms of order one. */
const ROUNDING_DIGITS = 12
const SEED = 20

const once = ({ truth }: Cases) => new Array(truth.length).fill(1)
const median = (cases: Cases, weights: Weights) =>
  medianAbsoluteError(cases, byAbsoluteError(cases), weights)

/** Errors 1, 0, 2, -1; worked by hand below. Invented. */
const four = casesOf([
  [1, 2, 1],
  [2, 2, 0.5],
  [3, 5, 1],
  [4, 3],
])

describe('the statistics of four estimates worked by hand', () => {
  it('have bias (1 + 0 + 2 - 1)/4 and mean square (1 + 0 + 4 + 1)/4', () => {
    const { bias, rmse } = errorMoments(four, once(four))
    expect(bias).toBeCloseTo(0.5, ROUNDING_DIGITS)
    expect(rmse).toBeCloseTo(Math.sqrt(1.5), ROUNDING_DIGITS)
  })

  it('have slope 3/5 and correlation 3/sqrt(5 6), from departures -3/2 -1/2 1/2 3/2 and -1 -1 2 0', () => {
    const { slope, correlation } = errorMoments(four, once(four))
    expect(slope).toBeCloseTo(0.6, ROUNDING_DIGITS)
    expect(correlation).toBeCloseTo(3 / Math.sqrt(30), ROUNDING_DIGITS)
  })

  it('have median absolute error 1, the mean of the middle two of 0 1 1 2', () => {
    expect(median(four, once(four))).toBe(1)
  })

  it('take the middle one of three absolute errors', () => {
    expect(median(four, [0, 1, 1, 1])).toBe(1)
    expect(median(four, [2, 0, 2, 0])).toBe(1.5)
  })

  it('cover two truths of the three that have an uncertainty, one of them just so', () => {
    expect(coverage(four, once(four))).toBeCloseTo(2 / 3, ROUNDING_DIGITS)
    expect(isWithin(1, 2, 1)).toBe(true)
    expect(isWithin(1, 2, 0.999)).toBe(false)
    expect(isWithin(1, 2, Number.NaN)).toBeNull()
    expect(isWithin(1, Number.NaN, 1)).toBeNull()
  })

  it.each([
    [2, 1, 1],
    [3, 1, 0],
    [4, 0, 1 / 3],
  ])(
    'have at threshold %d the hit rate %d and the false-alarm rate %d',
    (threshold, hit, alarm) => {
      expect(detectionRates(four, threshold, once(four))).toEqual({
        hitRate: hit,
        falseAlarmRate: alarm,
      })
    },
  )
})

describe('a statistic that does not apply', () => {
  it('is null without estimates', () => {
    const none = casesOf([[1, Number.NaN]])
    expect(Object.values(errorMoments(none, [1]))).toEqual([null, null, null, null])
    expect(median(none, [1])).toBeNull()
    expect(coverage(none, [1])).toBeNull()
  })

  it('is null for slope and correlation where the truth does not vary, be it 0.1 thrice', () => {
    const same = casesOf([
      [0.1, 1],
      [0.1, 2],
      [0.1, 4],
    ])
    expect(errorMoments(same, once(same))).toMatchObject({ slope: null, correlation: null })
  })

  it('is null for the correlation alone where the estimate does not vary', () => {
    const flat = casesOf([
      [1, 7],
      [2, 7],
    ])
    expect(errorMoments(flat, once(flat))).toMatchObject({ slope: 0, correlation: null })
  })

  it('is null for rates without threshold, without events, or with nothing but events', () => {
    expect(detectionRates(four, null, once(four))).toEqual({ hitRate: null, falseAlarmRate: null })
    expect(detectionRates(four, 9, once(four)).hitRate).toBeNull()
    expect(detectionRates(four, 0, once(four)).falseAlarmRate).toBeNull()
  })
})

describe('a scene whose retrieval gave no value', () => {
  const silent = casesOf([
    [5, Number.NaN],
    [5, 6],
    [1, Number.NaN],
    [1, 1],
  ])

  it('is a miss if it held an event and no false alarm if it did not', () => {
    expect(detectionRates(silent, 3, once(silent))).toEqual({ hitRate: 0.5, falseAlarmRate: 0 })
  })

  it('leaves the errors of the others alone', () => {
    expect(errorMoments(silent, once(silent)).bias).toBe(0.5)
    expect(median(silent, once(silent))).toBe(0.5)
  })
})

describe('the statistics in general', () => {
  const value = fc.double({ min: -100, max: 100, noNaN: true })
  const rows = fc.array(fc.tuple(value, value, fc.double({ min: 0, max: 100, noNaN: true })), {
    minLength: 3,
    maxLength: 12,
  })
  const weighted = rows.chain((list) =>
    fc.tuple(
      fc.constant(list),
      fc.array(fc.integer({ min: 0, max: 3 }), {
        minLength: list.length,
        maxLength: list.length,
      }),
    ),
  )

  it('count a case of weight three like three equal cases', () => {
    fc.assert(
      fc.property(weighted, ([list, weights]) => {
        const repeated = casesOf(list.flatMap((row, i) => new Array(weights[i]).fill(row)))
        const cases = casesOf(list)
        expect(median(cases, weights)).toBe(median(repeated, once(repeated)))
        expect(coverage(cases, weights)).toBe(coverage(repeated, once(repeated)))
        expect(detectionRates(cases, 10, weights)).toEqual(
          detectionRates(repeated, 10, once(repeated)),
        )
        const [ours, theirs] = [
          errorMoments(cases, weights),
          errorMoments(repeated, once(repeated)),
        ]
        // Sums of up to 36 terms of 1e4 in another order.
        if (theirs.bias === null) expect(ours.bias).toBeNull()
        else expect(ours.bias).toBeCloseTo(theirs.bias, 9)
        if (theirs.rmse === null) expect(ours.rmse).toBeNull()
        else expect(ours.rmse).toBeCloseTo(theirs.rmse, 6)
      }),
      { seed: SEED },
    )
  })

  it('move the bias, and nothing of correlation and slope, with a constant error', () => {
    fc.assert(
      fc.property(rows, value, (list, shift) => {
        fc.pre(new Set(list.map(([truth]) => Math.round(truth))).size > 2)
        const cases = casesOf(list)
        const moved = casesOf(list.map(([truth, estimate]) => [truth, estimate + shift]))
        const [before, after] = [cases, moved].map((set) => errorMoments(set, once(set)))
        // Rounding of numbers up to 200, over truths that differ by about one.
        expect(after.bias).toBeCloseTo((before.bias as number) + shift, 9)
        expect(after.slope).toBeCloseTo(before.slope as number, 9)
      }),
      { seed: SEED },
    )
  })

  it('never have a bias above the root mean square error', () => {
    fc.assert(
      fc.property(rows, (list) => {
        const { bias, rmse } = errorMoments(casesOf(list), once(casesOf(list)))
        // Equal for a constant error, up to rounding; squares of errors below 1e-162 are lost.
        expect(Math.abs(bias as number)).toBeLessThanOrEqual(
          (rmse as number) * (1 + 1e-12) + 1e-160,
        )
      }),
      { seed: SEED },
    )
  })
})
