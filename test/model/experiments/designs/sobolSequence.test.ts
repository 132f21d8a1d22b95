import { describe, expect, it } from 'vitest'
import { sobolDirectionTable } from '../../../../src/model/experiments/designs/sobolDirectionTable.ts'
import {
  MOST_SOBOL_DIMENSIONS,
  sobolSequence,
} from '../../../../src/model/experiments/designs/sobolSequence.ts'
import { refusalOf } from '../tinyNight.ts'

function points(dims: number, n: number, seed?: number): number[][] {
  const { point } = sobolSequence(dims, n, seed)
  return Array.from({ length: n }, (_, i) => point(i))
}

describe('the Sobol sequence', () => {
  it('begins with the published points', () => {
    // The first points of Joe and Kuo's direction numbers, as scipy 1.17 stats.qmc.Sobol gives them.
    expect(points(5, 8)).toEqual([
      [0, 0, 0, 0, 0],
      [0.5, 0.5, 0.5, 0.5, 0.5],
      [0.75, 0.25, 0.25, 0.25, 0.75],
      [0.25, 0.75, 0.75, 0.75, 0.25],
      [0.375, 0.375, 0.625, 0.875, 0.375],
      [0.875, 0.875, 0.125, 0.375, 0.875],
      [0.625, 0.125, 0.875, 0.625, 0.625],
      [0.125, 0.625, 0.375, 0.125, 0.125],
    ])
  })

  it('agrees with another program in 32 dimensions', () => {
    // Point 100 of scipy 1.17 stats.qmc.Sobol(32, scramble=False).
    expect(sobolSequence(32, 128).point(100)).toEqual([
      0.4140625, 0.2578125, 0.7734375, 0.7265625, 0.8828125, 0.7421875, 0.0234375, 0.4765625,
      0.6328125, 0.6953125, 0.4609375, 0.6796875, 0.4765625, 0.8515625, 0.3203125, 0.4921875,
      0.6796875, 0.7421875, 0.8359375, 0.3359375, 0.7578125, 0.3984375, 0.0078125, 0.4921875,
      0.0234375, 0.0078125, 0.9453125, 0.6640625, 0.2421875, 0.7265625, 0.7109375, 0.4140625,
    ])
  })

  it.each([undefined, 11])('has one point in each stratum of each dimension, seed %s', (seed) => {
    const n = 256
    const set = points(MOST_SOBOL_DIMENSIONS, n, seed)
    for (let dim = 0; dim < MOST_SOBOL_DIMENSIONS; dim++) {
      expect(new Set(set.map((point) => Math.floor(point[dim] * n))).size).toBe(n)
    }
  })

  it.each([undefined, 11])('is a (0, 6, 2)-net in its first two dimensions, seed %s', (seed) => {
    const set = points(2, 64, seed)
    for (let split = 0; split <= 6; split++) {
      const [columns, rows] = [2 ** split, 2 ** (6 - split)]
      const boxes = set.map(([x, y]) => Math.floor(x * columns) * rows + Math.floor(y * rows))
      expect(new Set(boxes).size).toBe(64)
    }
  })

  it('integrates a smooth function of 12 inputs far better than chance', () => {
    // The mean of the product of 1 + (x_i - 1/2)/i is 1; chance alone would err by 0.36/sqrt(4096) = 0.006.
    const set = points(12, 4096, 3)
    const value = (point: number[]) =>
      point.reduce((product, x, i) => product * (1 + (x - 0.5) / (i + 1)), 1)
    const mean = set.reduce((sum, point) => sum + value(point), 0) / set.length
    expect(Math.abs(mean - 1)).toBeLessThan(0.0006)
  })

  it('stays inside the open cube when shifted', () => {
    const all = points(3, 1024, 5).flat()
    expect(all.every((x) => x > 0 && x < 1)).toBe(true)
    expect(points(3, 4, 5)).not.toEqual(points(3, 4, 6))
  })

  it('refuses more dimensions than there are direction numbers', () => {
    expect(refusalOf(() => sobolSequence(33, 8))).toBe(
      'InputError: a Sobol sequence in 33 dimensions; allowed: up to 32',
    )
  })
})

describe('the direction numbers', () => {
  it('start odd and below their power of two', () => {
    for (const { degree, first } of sobolDirectionTable) {
      expect(first).toHaveLength(degree)
      expect(first.every((m, i) => m % 2 === 1 && m < 2 ** (i + 1))).toBe(true)
    }
  })

  it('belong to different primitive polynomials: x has the full order 2^s - 1', () => {
    const polynomials = sobolDirectionTable.map(
      ({ degree, coefficients }) => 2 ** degree + 2 * coefficients + 1,
    )
    expect(new Set(polynomials).size).toBe(polynomials.length)
    sobolDirectionTable.forEach(({ degree }, i) => {
      let power = 1
      let order = 0
      do {
        power <<= 1
        if (power >> degree) power ^= polynomials[i]
        order++
      } while (power !== 1 && order < 1000)
      expect(order).toBe(2 ** degree - 1)
    })
  })
})
