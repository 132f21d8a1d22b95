import { contours } from 'd3-contour'
import type { FieldScales } from './fieldImage.ts'
import { linePath } from './linePath.ts'
import type { TimeHeightField } from './timeHeightField.ts'

/** Value at a place between the members of an evenly spaced list; places count from 0 and may lie a little outside. */
function between(list: Float64Array, place: number): number {
  const last = list.length - 1
  return list[0] + (place / last) * (list[last] - list[0])
}

/**
 * The path along which a field has one value. It closes half a cell outside the field, so it is meant to be clipped to
 * the outermost centres.
 */
export function isoline(
  field: TimeHeightField,
  value: number,
  { time, altitude }: Pick<FieldScales, 'time' | 'altitude'>,
): string {
  const size: [number, number] = [field.altitudes_km.length, field.times_h.length]
  const lines = contours().size(size).contour(Array.from(field.values), value)
  return lines.coordinates
    .flat()
    .map((ring) =>
      linePath(
        // A value stands in the middle of its cell: half a cell from the edge where the places begin.
        ring.map(([, place]) => time(between(field.times_h, place - 0.5))),
        ring.map(([place]) => altitude(between(field.altitudes_km, place - 0.5))),
      ),
    )
    .join('')
}
