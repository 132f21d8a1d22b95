import { describe, expect, it } from 'vitest'
import { formatTime, parseTime } from '../../src/io/timeText.ts'

describe('parseTime', () => {
  it.each([
    ['12h', 43_200],
    ['90min', 5400],
    ['90 min', 5400],
    ['3600s', 3600],
    ['2d', 172_800],
    ['0.5', 1800],
    ['0', 0],
  ])('reads %s as %d seconds', (text, seconds) => {
    expect(parseTime(text)).toBe(seconds)
  })

  it.each(['', 'noon', '12 hours', '-3h', '1e999h', 'h', '1.2.3h'])('refuses %j', (text) => {
    expect(() => parseTime(text)).toThrow(`'${text}' is not a time; write 12h`)
  })
})

describe('formatTime', () => {
  it('gives hours without trailing noise', () => {
    expect(formatTime(3 * 3600 + 1e-7)).toBe('3 h')
    expect(formatTime(600)).toBe('0.166667 h')
  })
})
