import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { halfVanLeerSlope } from '../../../src/model/numerics/halfVanLeerSlope.ts'

/** Far above the 1e-300 that keeps the quotient finite, so that no product underflows. */
const difference = fc
  .double({ min: -1e6, max: 1e6, noNaN: true })
  .map((value) => (Math.abs(value) < 1e-60 ? 0 : value))
const seeded = { seed: 1974, numRuns: 500 }

describe('halfVanLeerSlope', () => {
  it('is half the difference where both are equal', () => {
    expect(halfVanLeerSlope(3, 3)).toBe(1.5)
    expect(halfVanLeerSlope(-0.2, -0.2)).toBeCloseTo(-0.1, 15)
  })

  it('is half the harmonic mean: 2 x 6/(2 + 6) between 2 and 6', () => {
    expect(halfVanLeerSlope(2, 6)).toBe(1.5)
  })

  it('is nothing at an extreme and beside a flat stretch', () => {
    for (const [before, after] of [
      [1, -2],
      [-2, 1],
      [3, -3],
      [0, 5],
      [0, -5],
      [0, 0],
    ]) {
      expect(Math.abs(halfVanLeerSlope(before, after))).toBe(0)
    }
  })

  it('makes no new extreme: a face value lies between its cell and the neighbour', () => {
    fc.assert(
      fc.property(difference, difference, (before, after) => {
        const slope = halfVanLeerSlope(before, after)
        // At most the smaller of the two differences, and of their sign.
        const smaller = Math.min(Math.abs(before), Math.abs(after))
        // One rounding of each of three operations.
        expect(Math.abs(slope)).toBeLessThanOrEqual(smaller * (1 + 4e-16))
        expect(slope * before).toBeGreaterThanOrEqual(0)
      }),
      seeded,
    )
  })

  it('treats both directions alike and scales with the quantity', () => {
    fc.assert(
      fc.property(difference, difference, (before, after) => {
        const slope = halfVanLeerSlope(before, after)
        // Exact: signs, order and powers of two do not round. The sums only tell -0 and 0 alike.
        expect(halfVanLeerSlope(after, before) + 0).toBe(slope + 0)
        expect(halfVanLeerSlope(-before, -after) + slope).toBe(0)
        expect(halfVanLeerSlope(4 * before, 4 * after) - 4 * slope).toBe(0)
      }),
      seeded,
    )
  })
})
