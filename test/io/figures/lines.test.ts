import { scaleLinear, scaleLog } from 'd3-scale'
import { describe, expect, it } from 'vitest'
import { isoline } from '../../../src/io/figures/isoline.ts'
import { layerOutline } from '../../../src/io/figures/layerOutline.ts'
import { linePath } from '../../../src/io/figures/linePath.ts'
import { decadeTicks, hourStep, linearTicks, steppedTicks } from '../../../src/io/figures/ticks.ts'
import { quantityText, unitText } from '../../../src/io/figures/unitText.ts'
import { layer, madeField, SPACING_KM } from './night.ts'

const same = { time: (time_h: number) => time_h, altitude: (altitude_km: number) => altitude_km }

/** The points of a path as pairs. */
function points(path: string): [number, number][] {
  return [...path.matchAll(/([-\d.]+),([-\d.]+)/g)].map(([, x, y]) => [Number(x), Number(y)])
}

describe('linePath', () => {
  it('breaks where a value is missing', () => {
    expect(linePath([0, 1, 2, 3, 4], [5, 6, Number.NaN, 7, 8])).toBe('M0,5L1,6M3,7L4,8')
  })

  it('is empty without values', () => {
    expect(linePath([0, 1], [Number.NaN, Number.NaN])).toBe('')
  })
})

describe('isoline', () => {
  it('lies where the field has the value', () => {
    const rising = madeField('altitude', 'km', (_, z) => z)
    const path = isoline(rising, 83.1, { time: same.time, altitude: (z) => 10 * z })
    const inside = points(path).filter(([x, y]) => x >= 0 && x <= 24 && y < 959)
    expect(inside.length).toBeGreaterThan(8)
    for (const [, y] of inside) expect(y).toBe(831)
  })

  it('is empty where the field never has the value', () => {
    expect(isoline(layer, 1e6, same)).toBe('')
  })
})

describe('layerOutline', () => {
  const { peak_km, overPeak, from_h } = layerOutline(layer)

  it('finds the peak of every profile, from when there is a layer', () => {
    expect(from_h).toBe(3)
    expect(peak_km[0]).toBeNaN()
    for (const peak of peak_km.slice(1)) expect(peak).toBeCloseTo(83, 9)
  })

  it('encloses the full width at half maximum', () => {
    const ys = points(isoline(overPeak, 0.5, { ...same, altitude: (z) => 1000 * z }))
      .filter(([x]) => x > 3 && x < 24)
      .map(([, y]) => y / 1000)
    // Of a Gaussian 2 sqrt(2 ln 2) standard deviations; straight lines between levels a quarter of one apart.
    const width = Math.max(...ys) - Math.min(...ys)
    expect(Math.abs(width - 2 * Math.sqrt(2 * Math.LN2))).toBeLessThan(SPACING_KM ** 2 / 4)
  })

  it('knows when there is nothing to outline', () => {
    expect(layerOutline(madeField('nothing', '1', () => 0)).from_h).toBeNaN()
  })
})

describe('ticks', () => {
  it('stand at round numbers of a linear scale', () => {
    const ticks = linearTicks(scaleLinear([0, 40], [100, 0]), 4)
    expect(ticks.map(({ label }) => label)).toEqual(['0', '10', '20', '30', '40'])
    expect(ticks.map(({ at }) => at)).toEqual([100, 75, 50, 25, 0])
  })

  it('stand at the powers of ten of a logarithmic scale', () => {
    const ticks = decadeTicks(scaleLog([1e-8, 1e-5], [30, 0]))
    expect(ticks.map(({ label }) => label)).toEqual(['10⁻⁸', '10⁻⁷', '10⁻⁶', '10⁻⁵'])
    expect(ticks.map(({ at }) => Math.round(at))).toEqual([30, 20, 10, 0])
  })

  it('stand at multiples of a step that suits the length of the run', () => {
    expect([6, 24, 36, 240, 672].map(hourStep)).toEqual([1, 3, 6, 48, 120])
    const ticks = steppedTicks(scaleLinear([1, 24], [0, 23]), 6)
    expect(ticks.map(({ label }) => label)).toEqual(['6', '12', '18', '24'])
  })
})

describe('unitText', () => {
  it('prints exponents raised and micro as such', () => {
    expect(unitText('ng m-3')).toBe('ng m⁻³')
    expect(unitText('m-1 sr-1')).toBe('m⁻¹ sr⁻¹')
    expect(unitText('ug m-2')).toBe('µg m⁻²')
    expect(unitText('K')).toBe('K')
  })

  it('leaves the unit of pure numbers out', () => {
    expect(quantityText('saturation ratio', '1')).toBe('saturation ratio')
    expect(quantityText('altitude', 'km')).toBe('altitude, km')
  })
})
