import { describe, expect, it } from 'vitest'
import { InputError } from '../../../src/model/errors.ts'
import { matchScenes, namesText } from '../../../src/model/scoring/matchScenes.ts'
import { pairedCases } from '../../../src/model/scoring/pairedCases.ts'

describe('scenes', () => {
  it('are matched by name, in the order of the truth', () => {
    const { pairs, matched } = matchScenes(['a', 'b', 'c'], ['c', 'a', 'b'])
    expect(pairs).toEqual([
      { truthRow: 0, estimateRow: 1 },
      { truthRow: 1, estimateRow: 2 },
      { truthRow: 2, estimateRow: 0 },
    ])
    expect(matched).toBe(3)
  })

  it('are named where they are unknown, missing, or estimated twice', () => {
    const match = matchScenes(['a', 'b', 'c'], ['a', 'x', 'a', 'y', 'x', 'a'])
    expect(match.unknown).toEqual({ count: 2, first: ['x', 'y'] })
    expect(match.missing).toEqual({ count: 2, first: ['b', 'c'] })
    expect(match.duplicate).toEqual({ count: 2, first: ['a', 'x'] })
    expect(match.pairs).toEqual([{ truthRow: 0, estimateRow: 0 }])
  })

  it('are counted in full, but only the first few named', () => {
    const truth = Array.from({ length: 12 }, (_, i) => `s${i}`)
    const { missing } = matchScenes(truth, ['s0'])
    expect(missing.count).toBe(11)
    expect(namesText(missing)).toBe('s1, s2, s3, s4, s5 and more')
  })

  it('may be drawn several times, but each draw once', () => {
    const match = matchScenes(['a'], ['a', 'a', 'a'], ['0', '1', '1'])
    expect(match.pairs.map(({ estimateRow }) => estimateRow)).toEqual([0, 1])
    expect(match.matched).toBe(1)
    expect(match.duplicate).toEqual({ count: 1, first: ['a'] })
  })

  it('may not be named twice by the truth', () => {
    expect(() => matchScenes(['a', 'b', 'a'], ['a'])).toThrow(
      new InputError('the truth names a scene more than once: a'),
    )
    expect(() => matchScenes(['a', 'b', 'a', 'b'], ['a'])).toThrow(
      'the truth names 2 scenes more than once: a, b',
    )
  })

  it('are scored where they have a truth, and keep their draws together', () => {
    const match = matchScenes(['a', 'b', 'c'], ['a', 'a', 'b', 'c'], ['0', '1', '0', '0'])
    const cases = pairedCases(match, {
      truth: Float64Array.of(1, Number.NaN, 3),
      estimate: Float64Array.of(10, 11, 12, Number.NaN),
      uncertainty: Float64Array.of(0.1, 0.2, 0.3, 0.4),
    })
    expect(cases).toEqual({
      scene: Int32Array.of(0, 0, 1),
      scenes: 2,
      truth: Float64Array.of(1, 1, 3),
      estimate: Float64Array.of(10, 11, Number.NaN),
      uncertainty: Float64Array.of(0.1, 0.2, 0.4),
    })
  })
})
