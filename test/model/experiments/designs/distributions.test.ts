import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  list,
  logUniform,
  normal,
  uniform,
} from '../../../../src/model/experiments/designs/distributions.ts'
import {
  chanceBetween,
  cumulativeNormal,
} from '../../../../src/model/experiments/designs/normalQuantile.ts'

describe('the cumulative normal distribution', () => {
  it.each([
    // Computed independently with 25 digits from erfc.
    [-3, 0.0013498980316300946],
    [-1, 0.15865525393145707],
    [0.5, 0.6914624612740131],
    [2, 0.9772498680518208],
    [4, 0.9999683287581669],
  ])('at %d is %d', (x, chance) => {
    // 14 digits: the sum is exact to rounding of numbers up to one.
    expect(cumulativeNormal(x)).toBeCloseTo(chance, 14)
  })

  it('is 0 and 1 far out', () => {
    expect([cumulativeNormal(-40), cumulativeNormal(40)]).toEqual([0, 1])
  })
})

describe('a distribution', () => {
  it.each([
    // Quantiles of the standard normal distribution between -1 and 2, computed independently with 25 digits.
    [0.1, -0.7046478210947452],
    [0.5, 0.17116391801782477],
    [0.9, 1.2557153641502152],
  ])('of cut normal numbers has the share %d below %d', (share, value) => {
    const quantile = normal({ mean: 10, standard_deviation: 3, from: 7, to: 16 })
    // 12 digits: the chance is exact to 1e-16, the density here above 0.1.
    expect(quantile(share)).toBeCloseTo(10 + 3 * value, 12)
  })

  it('stays between its limits, and rises', () => {
    const share = fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true })
    const distributions = [
      uniform(2, 5),
      logUniform(2, 5),
      normal({ mean: 0, standard_deviation: 4, from: 2, to: 5 }),
    ]
    fc.assert(
      fc.property(share, share, (a, b) => {
        const [low, high] = [Math.min(a, b), Math.max(a, b)]
        for (const quantile of distributions) {
          expect(quantile(low)).toBeLessThanOrEqual(quantile(high))
          expect(quantile(low)).toBeGreaterThanOrEqual(2)
          expect(quantile(high)).toBeLessThanOrEqual(5)
        }
      }),
      { seed: 6 },
    )
  })

  it('of logarithms has the geometric mean in its middle', () => {
    expect(logUniform(1, 100)(0.5)).toBeCloseTo(10, 12)
    expect(uniform(1, 100)(0.5)).toBe(50.5)
  })

  it('of a list gives each value the same share', () => {
    const pick = list(['a', 'b', 'c'])
    expect([0, 0.33, 0.34, 0.66, 0.67, 0.999999].map(pick)).toEqual(['a', 'a', 'b', 'b', 'c', 'c'])
  })

  it('knows how much lies between two limits', () => {
    // One standard deviation on both sides, 0.6827: 1 - 2 x 0.158655.
    expect(chanceBetween(-1, 1)).toBeCloseTo(1 - 2 * 0.15865525393145707, 14)
  })
})
