import { describe, expect, it } from 'vitest'
import { randomStream } from '../../../src/model/numerics/random.ts'

const COUNT = 20_000

function moments(draw: () => number): { mean: number; variance: number } {
  const values = Array.from({ length: COUNT }, draw)
  const mean = values.reduce((sum, value) => sum + value, 0) / COUNT
  const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / COUNT
  return { mean, variance }
}

describe('a stream of random numbers', () => {
  it('is the same for the same seed and another for another', () => {
    const first = (seed: number) => Array.from({ length: 5 }, randomStream(seed).uniform)
    expect(first(3)).toEqual(first(3))
    expect(first(3)).not.toEqual(first(4))
  })

  it('spreads evenly over 0 to 1', () => {
    const { mean, variance } = moments(randomStream(1).uniform)
    // Five standard errors: sqrt(1/12/20000) = 0.0020 of the mean, sqrt(1/180/20000) = 0.00053 of the variance.
    expect(Math.abs(mean - 0.5)).toBeLessThan(0.0102)
    expect(Math.abs(variance - 1 / 12)).toBeLessThan(0.0027)
  })

  it('draws normal numbers of mean 0 and variance 1', () => {
    const { mean, variance } = moments(randomStream(1).normal)
    // Five standard errors: 1/sqrt(20000) = 0.0071 of the mean, sqrt(2/20000) = 0.01 of the variance.
    expect(Math.abs(mean)).toBeLessThan(0.0354)
    expect(Math.abs(variance - 1)).toBeLessThan(0.05)
  })
})
