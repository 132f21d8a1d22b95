import { inflateSync } from 'node:zlib'
import { describe, expect, it } from 'vitest'
import { indexedPng } from '../../../src/io/figures/indexedPng.ts'

describe('indexedPng', () => {
  const png = indexedPng(3, Uint8Array.from([0, 1, 2, 2, 1, 0]), [
    [255, 255, 255],
    [10, 20, 30],
    [40, 50, 60],
  ])
  const content = (type: string) => {
    const at = png.indexOf(type, 0, 'latin1')
    return png.subarray(at + 4, at + 4 + png.readUInt32BE(at - 4))
  }

  it('holds the pixels row by row behind a filter byte', () => {
    expect([...inflateSync(content('IDAT'))]).toEqual([0, 0, 1, 2, 0, 2, 1, 0])
  })

  it('states its size, eight bits and a palette', () => {
    expect([content('IHDR').readUInt32BE(0), content('IHDR').readUInt32BE(4)]).toEqual([3, 2])
    expect([...content('IHDR').subarray(8)]).toEqual([8, 3, 0, 0, 0])
    expect([...content('PLTE')]).toEqual([255, 255, 255, 10, 20, 30, 40, 50, 60])
  })

  it('ends with the check sum that every PNG ends with', () => {
    // The CRC of an empty IEND chunk, common knowledge, from memory.
    expect(png.readUInt32BE(png.length - 4)).toBe(0xae426082)
  })
})
