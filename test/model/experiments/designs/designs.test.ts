import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Design } from '../../../../src/model/experiments/designs/design.ts'
import { gridDesign } from '../../../../src/model/experiments/designs/gridDesign.ts'
import { latinHypercube } from '../../../../src/model/experiments/designs/latinHypercube.ts'
import { saltelliDesign } from '../../../../src/model/experiments/designs/saltelliDesign.ts'

function pointsOf({ count, point }: Design): number[][] {
  return Array.from({ length: count }, (_, i) => point(i))
}

describe('a grid', () => {
  it('runs through every combination, the last axis fastest', () => {
    const { count, positions } = gridDesign([2, 3])
    expect(Array.from({ length: count }, (_, i) => positions(i))).toEqual([
      [0, 0],
      [0, 1],
      [0, 2],
      [1, 0],
      [1, 1],
      [1, 2],
    ])
  })

  it('has no combination twice', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 1, max: 6 }), { minLength: 1, maxLength: 4 }),
        (lengths) => {
          const { count, positions } = gridDesign(lengths)
          const seen = new Set(Array.from({ length: count }, (_, i) => positions(i).join()))
          expect(seen.size).toBe(lengths.reduce((a, b) => a * b))
        },
      ),
      { seed: 4 },
    )
  })
})

describe('a Latin hypercube', () => {
  it('has one point in each stratum of each dimension', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 2 ** 32 - 1 }),
        fc.integer({ min: 1, max: 300 }),
        fc.integer({ min: 1, max: 5 }),
        (seed, n, dims) => {
          const points = pointsOf(latinHypercube(seed, n, dims))
          for (let dim = 0; dim < dims; dim++) {
            const strata = points.map((point) => Math.floor(point[dim] * n))
            expect(new Set(strata).size).toBe(n)
            expect(Math.min(...strata)).toBe(0)
            expect(Math.max(...strata)).toBe(n - 1)
          }
        },
      ),
      { seed: 5, numRuns: 50 },
    )
  })

  it('depends on its seed alone, and pairs the dimensions at random', () => {
    const points = pointsOf(latinHypercube(1, 200, 2))
    expect(pointsOf(latinHypercube(1, 200, 2))).toEqual(points)
    expect(pointsOf(latinHypercube(2, 200, 2))).not.toEqual(points)
    const covariance = points.reduce((sum, [x, y]) => sum + (x - 0.5) * (y - 0.5), 0) / 200
    // Twelve times the covariance is the correlation; its standard deviation is 1/sqrt(200) = 0.07.
    expect(Math.abs(12 * covariance)).toBeLessThan(0.25)
  })
})

describe('a Saltelli design', () => {
  const design = saltelliDesign(7, 8, 3)

  it('has blocks of A, B, and A with one coordinate after the other from B', () => {
    expect(design.count).toBe(8 * 5)
    for (let sample = 0; sample < design.samples; sample++) {
      const at = (role: 'a' | 'b' | number) => design.point(design.index(sample, role))
      const [a, b] = [at('a'), at('b')]
      expect(at(0)).toEqual([b[0], a[1], a[2]])
      expect(at(1)).toEqual([a[0], b[1], a[2]])
      expect(at(2)).toEqual([a[0], a[1], b[2]])
      expect(a.some((value, i) => value === b[i])).toBe(false)
    }
  })

  it('fills the strata of A and of B, and no coordinate is 0 or 1', () => {
    for (const role of ['a', 'b'] as const) {
      for (let dim = 0; dim < 3; dim++) {
        const values = Array.from({ length: 8 }, (_, i) => design.point(design.index(i, role))[dim])
        expect(new Set(values.map((value) => Math.floor(value * 8))).size).toBe(8)
        expect(values.every((value) => value > 0 && value < 1)).toBe(true)
      }
    }
  })
})
