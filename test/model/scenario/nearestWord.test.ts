import { describe, expect, it } from 'vitest'
import { nearestWord } from '../../../src/model/scenario/nearestWord.ts'

describe('the nearest word', () => {
  it.each([
    ['temprature', 'temperature'],
    ['WATER', 'water'],
    ['duration', 'duration_h'],
    ['tmperatuer', 'temperature'],
    ['xyz', null],
  ])('of %s is %s', (mistyped, nearest) => {
    expect(nearestWord(mistyped, ['water', 'temperature', 'duration_h', 'ice'])).toBe(nearest)
  })

  it('of anything among no words is none', () => {
    expect(nearestWord('water', [])).toBeNull()
  })
})
