import { describe, expect, it } from 'vitest'
import { type Colour, colourMap, colourOfLab } from '../../../src/io/figures/colourMap.ts'

/** Relative luminance of sRGB: IEC 61966-2-1 and the weights of BT.709, from memory. */
function luminance(colour: Colour): number {
  const [red, green, blue] = colour.map((byte) => {
    const value = byte / 255
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4
  })
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue
}

/** CIE L*a*b* of an sRGB colour, white D65; formulas and numbers from memory. A space other than the map's own. */
function cieLab(colour: Colour): number[] {
  const [red, green, blue] = colour.map((byte) => {
    const value = byte / 255
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4
  })
  const bend = (t: number) => (t > 216 / 24389 ? Math.cbrt(t) : (24389 / 27) * (t / 116) + 16 / 116)
  const x = bend((0.4124 * red + 0.3576 * green + 0.1805 * blue) / 0.9505)
  const y = bend(0.2126 * red + 0.7152 * green + 0.0722 * blue)
  const z = bend((0.0193 * red + 0.1192 * green + 0.9505 * blue) / 1.089)
  return [116 * y - 16, 500 * (x - y), 200 * (y - z)]
}

describe('colourOfLab', () => {
  it('makes white, black and a colourless grey where there is no chroma', () => {
    expect(colourOfLab([1, 0, 0])).toEqual([255, 255, 255])
    expect(colourOfLab([0, 0, 0])).toEqual([0, 0, 0])
    const [red, green, blue] = colourOfLab([0.6, 0, 0])
    expect([green, blue]).toEqual([red, red])
  })
})

describe('colourMap', () => {
  const shares = Array.from({ length: 11 }, (_, i) => i / 10)

  it('darkens all the way, from nearly white to nearly black', () => {
    const luminances = shares.map((share) => luminance(colourMap(share)))
    for (let i = 1; i < luminances.length; i++)
      expect(luminances[i]).toBeLessThan(luminances[i - 1])
    expect(luminances[0]).toBeGreaterThan(0.9)
    expect(luminances[10]).toBeLessThan(0.04)
  })

  it('takes steps of like size, seen in another colour space than its own', () => {
    const labs = shares.map((share) => cieLab(colourMap(share)))
    const steps = labs
      .slice(1)
      .map((lab, i) => Math.hypot(...lab.map((value, k) => value - labs[i][k])))
    // A factor 2: the two spaces disagree by that much on blues; a rainbow map differs by more than 5.
    expect(Math.max(...steps) / Math.min(...steps)).toBeLessThan(2)
  })

  it('stays at its ends beyond them', () => {
    expect(colourMap(-1)).toEqual(colourMap(0))
    expect(colourMap(2)).toEqual(colourMap(1))
  })
})
