import { describe, expect, it } from 'vitest'
import { csvNames, csvRows, shortNumber, textTable } from '../../src/io/textTable.ts'

const columns = [
  { name: 'channel', values: ['a,b', 'say "x"'] },
  { name: 'peak_km', values: [83.123456789, Number.NaN] },
]

describe('textTable', () => {
  it('aligns texts left and numbers right, with six digits', () => {
    expect(textTable(columns)).toBe('channel  peak_km\na,b      83.1235\nsay "x"\n')
  })

  it('shows the names alone of a table without rows', () => {
    expect(textTable([{ name: 'time_h', values: [] }])).toBe('time_h\n')
  })
})

describe('shortNumber', () => {
  it.each([
    [0, '0'],
    [-150.25, '-150.25'],
    [1 / 3, '0.333333'],
    [0.1 + 0.2, '0.3'],
    [4.584621e15, '4.58462e15'],
    [3.2e-10, '3.2e-10'],
    [9_999_999.9, '1e7'],
    [Infinity, 'Infinity'],
    [Number.NaN, ''],
  ])('writes %d as %j', (value, text) => {
    expect(shortNumber(value)).toBe(text)
  })
})

describe('csvRows', () => {
  it('keeps all digits, quotes what must be, and leaves nulls empty', () => {
    expect(csvNames(columns) + csvRows(columns)).toBe(
      'channel,peak_km\n"a,b",83.123456789\n"say ""x""",\n',
    )
  })
})
