import { colourMap } from './colourMap.ts'
import { element } from './element.ts'
import { indexedPng } from './indexedPng.ts'
import type { TimeHeightField } from './timeHeightField.ts'

/** Colour 0 is transparent, for what has no value. */
const SHADES = 255

export interface FieldScales {
  /** Pixels over hours. */
  time: (time_h: number) => number
  /** Pixels over kilometres. */
  altitude: (altitude_km: number) => number
  /** From 0 to 1 over the values of the field. */
  share: (value: number) => number
}

const PALETTE = [
  colourMap(0),
  ...Array.from({ length: SHADES }, (_, shade) => colourMap(shade / (SHADES - 1))),
]

function shadeOf(share: number): number {
  if (Number.isNaN(share)) return 0
  return 1 + Math.round(Math.min(1, Math.max(0, share)) * (SHADES - 1))
}

/** Altitude grows upward, rows of an image grow downward. */
function pixelsOf(field: TimeHeightField, share: FieldScales['share']): Uint8Array {
  const [columns, rows] = [field.times_h.length, field.altitudes_km.length]
  const pixels = new Uint8Array(columns * rows)
  for (let row = 0; row < rows; row++)
    for (let column = 0; column < columns; column++)
      pixels[row * columns + column] = shadeOf(
        share(field.values[column * rows + (rows - 1 - row)]),
      )
  return pixels
}

/** First and last edge of evenly spaced cells around their centres. */
function cellEdges(centres: Float64Array): [number, number] {
  const last = centres.length - 1
  const half = (centres[last] - centres[0]) / last / 2
  return [centres[0] - half, centres[last] + half]
}

/** The field as one image with a pixel per value; it reaches half a cell beyond the outermost centres. */
export function fieldImage(field: TimeHeightField, scales: FieldScales): string {
  const png = indexedPng(field.times_h.length, pixelsOf(field, scales.share), PALETTE)
  const [left, right] = cellEdges(field.times_h).map(scales.time)
  const [bottom, top] = cellEdges(field.altitudes_km).map(scales.altitude)
  return element('image', {
    x: left,
    y: top,
    width: right - left,
    height: bottom - top,
    preserveAspectRatio: 'none',
    style: 'image-rendering:pixelated',
    href: `data:image/png;base64,${png.toString('base64')}`,
  })
}
