import { describe, expect, it } from 'vitest'
import { randomStream } from '../../../src/model/numerics/random.ts'
import { resolve } from '../../../src/model/scenario/resolve.ts'
import { prepareColumn } from '../../../src/model/state/column.ts'
import {
  makeReferenceTendency,
  TERM_NAMES,
} from '../../../src/model/tendency/reference/referenceTendency.ts'
import { evaluated, relativeDifferences } from './compareTendencies.ts'
import { randomCase } from './randomColumn.ts'

/** Rounding of sums of eight terms that partly cancel. */
const ROUNDING = 1e-11

describe('makeReferenceTendency', () => {
  it('is the sum of its terms, each taken alone', () => {
    const random = randomStream(23)
    for (let trial = 0; trial < 10; trial++) {
      const { column, time_s, y } = randomCase(random)
      const sum = new Array<number>(y.length).fill(0)
      for (const name of TERM_NAMES) {
        const part = evaluated(makeReferenceTendency(column, [name]), column, { time_s, y })
        part.forEach((value, index) => {
          sum[index] += value
        })
      }
      const whole = evaluated(makeReferenceTendency(column), column, { time_s, y })
      for (const difference of Object.values(relativeDifferences(column, sum, whole))) {
        expect(difference).toBeLessThan(ROUNDING)
      }
    }
  })

  it('does nothing when every term is switched off', () => {
    const { column, time_s, y } = randomCase(randomStream(24))
    const dy = evaluated(makeReferenceTendency(column, []), column, { time_s, y })
    expect(dy.every((value) => value === 0)).toBe(true)
  })

  it('moves nothing but ice when only vertical motion is on and the wind is still', () => {
    const column = prepareColumn(resolve({ processes: { wind: false } }).scenario)
    const y = new Array<number>(column.layout.length).fill(1e6)
    const tendency = makeReferenceTendency(column, ['verticalMotion'])
    const dy = evaluated(tendency, column, { time_s: 1000, y })
    const { ice, cores } = column.layout
    expect(dy.slice(0, ice).every((value) => value === 0)).toBe(true)
    expect(dy.slice(ice, cores).every((value) => value !== 0)).toBe(true)
  })
})
