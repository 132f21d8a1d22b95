import { inflateSync } from 'node:zlib'
import { describe, expect, it } from 'vitest'
import { fieldImage } from '../../../src/io/figures/fieldImage.ts'

describe('fieldImage', () => {
  const field = {
    longName: 'amount',
    unit: '1',
    times_h: Float64Array.from([0, 1, 2]),
    altitudes_km: Float64Array.from([80, 81]),
    values: Float64Array.from([0, 1, 0, Number.NaN, 0.5, 2]),
  }
  const image = fieldImage(field, {
    time: (time_h) => 100 * time_h,
    altitude: (altitude_km) => 10 * (90 - altitude_km),
    share: (value) => value,
  })

  it('reaches half a cell beyond the outermost centres', () => {
    expect(image).toContain('x="-50" y="85" width="300" height="20"')
  })

  it('has the highest altitude in its first row, and no colour where there is no value', () => {
    const [, base64] = /base64,([^"]+)/.exec(image) ?? []
    const png = Buffer.from(base64, 'base64')
    const at = png.indexOf('IDAT', 0, 'latin1')
    const rows = inflateSync(png.subarray(at + 4, at + 4 + png.readUInt32BE(at - 4)))
    expect([...rows]).toEqual([0, 255, 0, 255, 0, 1, 1, 128])
  })
})
