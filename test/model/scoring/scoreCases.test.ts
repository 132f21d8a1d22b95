import { describe, expect, it } from 'vitest'
import { randomStream } from '../../../src/model/numerics/random.ts'
import { scoreCases } from '../../../src/model/scoring/scoreCases.ts'
import type {
  Cases,
  Score,
  ScoredStatistic,
  StatisticName,
} from '../../../src/model/scoring/types.ts'
import { casesOf } from './casesOf.ts'

const BOOTSTRAP = { seed: 7, resamples: 400 }

function scored(score: Score, name: StatisticName): ScoredStatistic {
  const found = score[name]
  if (found === null) throw new Error(`${name} does not apply`)
  return found
}

/** Truth even over 0 to 10, estimate 3 + 0.8 truth + normal noise of deviation 1, correctly stated. */
function synthetic(count: number, seed: number): Cases {
  const { uniform, normal } = randomStream(seed)
  return casesOf(
    Array.from({ length: count }, () => {
      const truth = 10 * uniform()
      return [truth, 3 + 0.8 * truth + normal(), 1] as const
    }),
  )
}

/** Unbiased with normal errors of deviation 2 that are stated correctly. */
function unbiased(count: number, seed: number): Cases {
  const { uniform, normal } = randomStream(seed)
  return casesOf(
    Array.from({ length: count }, () => {
      const truth = 10 * uniform()
      return [truth, truth + 2 * normal(), 2] as const
    }),
  )
}

describe('synthetic errors of known statistics', () => {
  const COUNT = 20_000
  const few = { seed: 1, resamples: 2 }
  const sloped = scoreCases(synthetic(COUNT, 1), null, few)
  const plain = scoreCases(unbiased(COUNT, 2), 5, few)

  it('have the bias 3 - 0.2 <t> = 2', () => {
    // Variance of the error 0.04 (100/12) + 1 = 4/3; four standard errors.
    expect(Math.abs(scored(sloped, 'bias').value - 2)).toBeLessThan(4 * Math.sqrt(4 / 3 / COUNT))
  })

  it('have the root mean square sqrt(2^2 + 4/3)', () => {
    // Its standard error is below sqrt(var e^2)/(2 rmse sqrt n), var e^2 about 4 bias^2 (4/3) + 2 (4/3)^2 = 25.
    const tolerance = (4 * Math.sqrt(25 / COUNT)) / (2 * Math.sqrt(16 / 3))
    expect(Math.abs(scored(sloped, 'rmse').value - Math.sqrt(16 / 3))).toBeLessThan(tolerance)
  })

  it('have the slope 0.8', () => {
    // Standard error 1/sqrt(n var t), var t = 100/12; four of them.
    const tolerance = 4 / Math.sqrt((COUNT * 100) / 12)
    expect(Math.abs(scored(sloped, 'slope').value - 0.8)).toBeLessThan(tolerance)
  })

  it('have the correlation sqrt(0.64 v/(0.64 v + 1)), v = 100/12', () => {
    const signal = (0.64 * 100) / 12
    const expected = Math.sqrt(signal / (signal + 1))
    // Standard error of a correlation (1 - r^2)/sqrt n, from memory; four of them.
    const tolerance = (4 * (1 - expected ** 2)) / Math.sqrt(COUNT)
    expect(Math.abs(scored(sloped, 'correlation').value - expected)).toBeLessThan(tolerance)
  })

  it('have half their errors within 0.67449 standard deviations', () => {
    // Quartile of the normal distribution, from memory. Standard error of a median sqrt(1/4n)/density,
    // the density of |e| at its median being 2 0.3178/2; four of them.
    const tolerance = (4 * Math.sqrt(1 / (4 * COUNT))) / 0.3178
    const { value } = scored(plain, 'medianAbsoluteError')
    expect(Math.abs(value - 2 * 0.67449)).toBeLessThan(tolerance)
  })

  it('are covered in 68.3 % of the cases by their correctly stated Gaussian uncertainty', () => {
    // erf(1/sqrt 2) = 0.6827, from memory; four standard errors of a share.
    const tolerance = 4 * Math.sqrt((0.6827 * 0.3173) / COUNT)
    expect(Math.abs(scored(plain, 'coverage').value - 0.6827)).toBeLessThan(tolerance)
  })

  it('hit as often as the normal distribution says, and give as many false alarms as misses', () => {
    // By symmetry of the even truth about the threshold. False alarms for noise 2, even truth 0 to 5 below 5:
    // (2/5) integral of Phi(-u) over u from 0 to 2.5 = (2/5)(u Phi(-u) - phi(u)) from 0 to 2.5
    // = (2/5)(2.5 0.0062097 - 0.0175283 + 0.3989423) = 0.15878; Phi and phi from memory.
    const tolerance = 4 * Math.sqrt((0.15878 * 0.84122) / (COUNT / 2))
    expect(Math.abs(scored(plain, 'falseAlarmRate').value - 0.15878)).toBeLessThan(tolerance)
    expect(Math.abs(scored(plain, 'hitRate').value - 0.84122)).toBeLessThan(tolerance)
  })
})

describe('the bootstrap intervals', () => {
  it('span what two scenes can give: both the one, or both the other', () => {
    const two = casesOf([
      [1, 1],
      [2, 3],
    ])
    expect(scoreCases(two, null, BOOTSTRAP).bias).toEqual({ value: 0.5, low: 0, high: 1 })
  })

  it('are null for a single scene', () => {
    const one = scoreCases(casesOf([[1, 3, 1]]), null, BOOTSTRAP)
    expect(one.bias).toEqual({ value: 2, low: null, high: null })
    expect(one.slope).toBeNull()
  })

  it('have the width that theory gives the mean of many, 2 x 1.96 sigma/sqrt(n)', () => {
    const { low, high } = scored(scoreCases(unbiased(400, 3), null, BOOTSTRAP), 'bias')
    const expected = (2 * 1.96 * 2) / Math.sqrt(400)
    // The deviation of 400 errors scatters by 3.5 %, the ends of 400 resamples by about 7 % of the width.
    expect(((high as number) - (low as number)) / expected).toBeGreaterThan(0.8)
    expect(((high as number) - (low as number)) / expected).toBeLessThan(1.2)
  })

  it('hold the true bias about as often as they say', () => {
    const EXPERIMENTS = 200
    const hits = Array.from({ length: EXPERIMENTS }, (_, seed) => {
      const { low, high } = scored(
        scoreCases(unbiased(50, 100 + seed), null, { seed, resamples: 200 }),
        'bias',
      )
      return (low as number) <= 0 && (high as number) >= 0
    }).filter(Boolean).length
    // 95 %, less one or two for the few scenes; four standard errors of a share of 200 are 6 %.
    expect(hits / EXPERIMENTS).toBeGreaterThan(0.87)
    expect(hits / EXPERIMENTS).toBeLessThan(1)
  })

  it('are equal for equal seeds and differ for others', () => {
    const cases = unbiased(50, 4)
    const first = scoreCases(cases, 5, BOOTSTRAP)
    expect(scoreCases(cases, 5, BOOTSTRAP)).toEqual(first)
    const other = scoreCases(cases, 5, { ...BOOTSTRAP, seed: 8 })
    expect(other.bias?.value).toBe(first.bias?.value)
    expect(other.bias?.low).not.toBe(first.bias?.low)
  })

  it('grow no narrower by drawing every scene thrice with the same result', () => {
    const cases = unbiased(40, 5)
    const thrice = <T extends Int32Array | Float64Array>(values: T) =>
      Array.from(values).flatMap((value) => [value, value, value])
    const repeated = scoreCases(
      {
        scene: Int32Array.from(thrice(cases.scene)),
        scenes: cases.scenes,
        truth: Float64Array.from(thrice(cases.truth)),
        estimate: Float64Array.from(thrice(cases.estimate)),
        uncertainty: Float64Array.from(thrice(cases.uncertainty)),
      },
      5,
      BOOTSTRAP,
    )
    const plain = scoreCases(cases, 5, BOOTSTRAP)
    expect(repeated.scenes).toBe(40)
    expect(repeated.estimates).toBe(120)
    // Sums of three times as many terms; rounding.
    for (const name of ['bias', 'rmse', 'coverage', 'hitRate'] as const)
      for (const end of ['low', 'high'] as const)
        expect(repeated[name]?.[end]).toBeCloseTo(plain[name]?.[end] as number, 12)
  })
})
