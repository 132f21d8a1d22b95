import { describe, expect, it } from 'vitest'
import { numberRanges } from '../../../src/io/study/numberRanges.ts'
import { parseLattice, parseSpan } from '../../../src/io/study/parseLattice.ts'
import { parsePart, shareOf } from '../../../src/io/study/parsePart.ts'
import { progressText, rateText, spanText } from '../../../src/io/study/studyProgress.ts'
import { unitOfName } from '../../../src/io/study/unitOfName.ts'

describe('parts of a study', () => {
  it('share all members among them, none twice', () => {
    const shares = [1, 2, 3].flatMap((number) => [...shareOf({ number, of: 3 }, 11)])
    expect(shares.sort((a, b) => a - b)).toEqual(Array.from({ length: 11 }, (_, i) => i))
    expect([...shareOf({ number: 4, of: 5 }, 3)]).toEqual([])
  })

  it.each(['5/4', '0/4', '1', '1/0', '-1/4', '1.5/4', 'a/b', ''])('refuse %j', (text) => {
    expect(() => parsePart(text)).toThrow(`--part ${text}: expected i/n with i from 1 to n`)
  })

  it('are read as typed', () => {
    expect(parsePart('2/5')).toEqual({ number: 2, of: 5 })
  })
})

describe('lattices', () => {
  it.each([
    ['80..92/2km', 'km', [80, 92, 2]],
    ['80.5..92.25/0.25 km', 'km', [80.5, 92.25, 0.25]],
    ['0..20/4h', 'h', [0, 20, 4]],
    ['6h', 'h', [6, 6, 1]],
  ] as const)('read %s', (text, unit, numbers) => {
    expect(parseLattice(text, unit, 'option')).toEqual(numbers)
  })

  it.each(['80..92km', '80-92/2km', '80..92/2h', '80..92/2', 'everywhere', '80..92/2kmx'])(
    'refuse %j',
    (text) => {
      expect(() => parseLattice(text, 'km', 'bands')).toThrow(
        `--bands ${text}: expected FROM..TO/STEP and the unit km, such as 80..92/2km`,
      )
    },
  )

  it('have spans of time beside them', () => {
    expect(parseSpan('18..24h', 'mean')).toEqual([18, 24])
    expect(() => parseSpan('18-24h', 'mean')).toThrow('--mean 18-24h: expected FROM..TO')
  })
})

describe('progress', () => {
  it('tells how many are done, the rate and the time left', () => {
    expect(progressText({ done: 30, total: 100, fresh: 20 }, 10)).toBe(
      '30 of 100 done, 2.00/s, 35 s left',
    )
    expect(progressText({ done: 10, total: 100, fresh: 0 }, 10)).toBe('10 of 100 done')
  })

  it('uses units that make handy numbers', () => {
    expect([spanText(89), spanText(600), spanText(7200)]).toEqual(['89 s', '10 min', '2.0 h'])
    expect([rateText(2.5), rateText(0.5), rateText(0.001)]).toEqual([
      '2.50/s',
      '30.0/min',
      '3.60/h',
    ])
  })
})

describe('names', () => {
  it.each([
    ['peak_backscatter_532nm_mie_per_m_sr', 'm-1 sr-1'],
    ['albedo_260nm_per_sr', 'sr-1'],
    ['column_ice_ug_per_m2', 'ug m-2'],
    ['temperature_offset_K', 'K'],
    ['wind_cm_per_s', 'cm s-1'],
    ['most_column_ice_at_h', 'h'],
    ['water_factor', '1'],
    ['water_at_83km_ppmv', '1e-6'],
  ])('carry their unit: %s', (name, unit) => {
    expect(unitOfName(name)).toBe(unit)
  })

  it('of many members are told in ranges', () => {
    expect(numberRanges([0, 1, 2, 5, 7, 8])).toBe('0-2, 5, 7-8')
    expect(numberRanges([])).toBe('')
    const scattered = Array.from({ length: 30 }, (_, i) => 2 * i)
    expect(numberRanges(scattered)).toMatch(/, 22 and more$/)
  })
})
