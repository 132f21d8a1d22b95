import { describe, expect, it } from 'vitest'
import { saltelliDesign } from '../../../src/model/experiments/designs/saltelliDesign.ts'
import { type SaltelliResults, sobolIndices } from '../../../src/model/experiments/sobolIndices.ts'

function evaluate(
  f: (x: number[]) => number,
  { seed, n, dims }: { seed: number; n: number; dims: number },
): SaltelliResults {
  const design = saltelliDesign(seed, n, dims)
  const at = (role: 'a' | 'b' | number) =>
    Array.from({ length: n }, (_, sample) => f(design.point(design.index(sample, role))))
  return { a: at('a'), b: at('b'), mixed: Array.from({ length: dims }, (_, i) => at(i)) }
}

/** Ishigami and Homma 1990, from memory: sin x1 + a sin^2 x2 + b x3^4 sin x1 on [-pi, pi], a = 7, b = 0.1. */
function ishigami(point: number[]): number {
  const [x1, x2, x3] = point.map((share) => Math.PI * (2 * share - 1))
  return Math.sin(x1) + 7 * Math.sin(x2) ** 2 + 0.1 * x3 ** 4 * Math.sin(x1)
}

/**
 * With D1 = (1 + b pi^4/5)^2/2, D2 = a^2/8, D13 = b^2 pi^8 (1/18 - 1/50): closed form of the variances, whose shares are
 * the published 0.3139, 0.4424, 0; 0.5576, 0.4424, 0.2437.
 */
const ISHIGAMI = { firstOrder: [0.3139, 0.4424, 0], total: [0.5576, 0.4424, 0.2437] }

describe('Sobol indices of the Ishigami function', () => {
  const indices = sobolIndices(evaluate(ishigami, { seed: 1, n: 8192, dims: 3 }), { seed: 1 })

  it.each(['firstOrder', 'total'] as const)('are the published ones: %s', (order) => {
    ISHIGAMI[order].forEach((published, i) => {
      // 0.005: some times 1/8192, the error of an evenly filled cube; chance alone would err by about 0.02.
      expect(Math.abs((indices[order][i]?.value ?? Number.NaN) - published)).toBeLessThan(0.005)
    })
  })

  it.each(['firstOrder', 'total'] as const)('lie inside their intervals: %s', (order) => {
    ISHIGAMI[order].forEach((published, i) => {
      const { low = Number.NaN, high = Number.NaN } = indices[order][i] ?? {}
      expect(low).toBeLessThan(published + 1e-12)
      expect(high).toBeGreaterThan(published - 1e-12)
      expect(high - low).toBeLessThan(0.1)
    })
  })

  it('depend on their seed alone', () => {
    const results = evaluate(ishigami, { seed: 1, n: 64, dims: 3 })
    const draw = (seed: number) => sobolIndices(results, { seed, resamples: 50 })
    expect(draw(2)).toEqual(draw(2))
    expect(draw(2)).not.toEqual(draw(3))
  })
})

describe('Sobol indices', () => {
  it('of a sum of independent inputs are their shares of the variance, alone and in total', () => {
    // Variances 1/12, 4/12, 9/12: shares 1/14, 4/14, 9/14.
    const results = evaluate(([x, y, z]) => x + 2 * y + 3 * z, { seed: 4, n: 4096, dims: 3 })
    const { firstOrder, total } = sobolIndices(results, { seed: 1, resamples: 20 })
    ;[1, 4, 9].forEach((square, i) => {
      // As above; a linear function is easier.
      expect(firstOrder[i]?.value).toBeCloseTo(square / 14, 2)
      expect(total[i]?.value).toBeCloseTo(square / 14, 2)
    })
  })

  it('of a constant, and of nothing, do not exist', () => {
    const constant = evaluate(() => 0.1, { seed: 4, n: 64, dims: 2 })
    expect(sobolIndices(constant, { seed: 1 })).toEqual({
      firstOrder: [null, null],
      total: [null, null],
    })
    const nothing = { a: [], b: [], mixed: [[], []] }
    expect(sobolIndices(nothing, { seed: 1 }).total).toEqual([null, null])
  })
})
