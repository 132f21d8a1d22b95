import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonicalJson } from '../../src/io/canonicalJson.ts'

describe('canonicalJson', () => {
  it('sorts the keys at every depth', () => {
    expect(canonicalJson({ b: [{ d: 1, c: null }], a: 'x' })).toBe(
      '{"a":"x","b":[{"c":null,"d":1}]}',
    )
  })

  it('keeps infinities apart from each other and from null', () => {
    expect(canonicalJson([Infinity, -Infinity, null])).toBe('["Infinity","-Infinity",null]')
  })

  it('leaves out what is undefined, as JSON does', () => {
    expect(canonicalJson({ a: undefined, b: 1 })).toBe('{"b":1}')
  })

  it('is JSON of the same value', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        expect(JSON.parse(canonicalJson(value))).toEqual(JSON.parse(JSON.stringify(value)))
      }),
      { seed: 20070624 },
    )
  })
})
