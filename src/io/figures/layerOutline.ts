import { layerShape } from '../../model/diagnostics/layer.ts'
import { largestValue, profileAt, type TimeHeightField } from './timeHeightField.ts'

/** Below this share of the largest value of the field a layer is not worth outlining. */
const FAINTEST = 0.01

export interface LayerOutline {
  /** Altitude of the peak at every time, km; NaN where there is next to no layer. */
  peak_km: Float64Array
  /** Every profile over its own peak: the value 1/2 encloses the full width at half maximum. */
  overPeak: TimeHeightField
  /** The first time at which there is a layer, h; NaN where there never is one. */
  from_h: number
}

/** Where the layer of a field has its peak, and how far it reaches. */
export function layerOutline(field: TimeHeightField): LayerOutline {
  const altitude_m = field.altitudes_km.map((altitude_km) => altitude_km * 1000)
  const spacing_m = altitude_m.map(() => altitude_m[1] - altitude_m[0])
  const faintest = FAINTEST * largestValue(field)
  const shapes = Array.from(field.times_h, (_, time) => {
    const shape = layerShape(profileAt(field, time), altitude_m, spacing_m)
    return shape !== null && shape.peak > faintest ? shape : null
  })
  const count = field.altitudes_km.length
  const first = shapes.findIndex((shape) => shape !== null)
  return {
    from_h: field.times_h[first] ?? Number.NaN,
    peak_km: Float64Array.from(shapes, (shape) => (shape?.peakAltitude_m ?? Number.NaN) / 1000),
    overPeak: {
      ...field,
      values: field.values.map((value, i) => {
        const shape = shapes[Math.floor(i / count)]
        return shape === null ? 0 : value / shape.peak
      }),
    },
  }
}
