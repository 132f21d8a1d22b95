import { scaleLinear } from 'd3-scale'
import { bottomAxis, leftAxis } from './axis.ts'
import { colourBar } from './colourBar.ts'
import { element } from './element.ts'
import { type FieldScales, fieldImage } from './fieldImage.ts'
import { type Frame, horizontalRange, verticalRange } from './frame.ts'
import { INKS } from './inks.ts'
import { isoline } from './isoline.ts'
import { layerOutline } from './layerOutline.ts'
import { type LegendEntry, type LineStyle, legend } from './legend.ts'
import { linePath } from './linePath.ts'
import { hourStep, linearTicks, steppedTicks } from './ticks.ts'
import { largestValue, type TimeHeightField } from './timeHeightField.ts'
import { quantityText } from './unitText.ts'

/** A line of one value of a second field. */
export interface Isoline {
  field: TimeHeightField
  value: number
  label: string
}

const PEAK: LineStyle = { stroke: INKS.second, 'stroke-width': 2 }
const HALF: LineStyle = { stroke: INKS.second, 'stroke-width': 1.2, 'stroke-dasharray': '5 3' }
const ISOLINE: LineStyle = { stroke: INKS.words, 'stroke-width': 1.5, 'stroke-dasharray': '1.5 3' }
/** Pixels that the closing stroke of an outline takes. */
const CLOSING_STROKE = 1
/** Under a dark line, so that it shows on dark ground. */
const HALO = { stroke: INKS.ground, 'stroke-width': 3, 'stroke-opacity': 0.6 }

const BAR = { gap: 14, width: 14 }

function mapScales(field: TimeHeightField, frame: Frame): FieldScales & { most: number } {
  const { times_h, altitudes_km } = field
  const share = scaleLinear([0, largestValue(field) || 1], [0, 1]).nice()
  const time = scaleLinear([times_h[0], times_h[times_h.length - 1]], horizontalRange(frame))
  const ends = [altitudes_km[0], altitudes_km[altitudes_km.length - 1]]
  const altitude = scaleLinear(ends, verticalRange(frame))
  return { time, altitude, share, most: share.domain()[1] }
}

function drawn(path: string, style: Record<string, string | number>): string {
  return element('path', { d: path, fill: 'none', ...style })
}

/** The outline of the layer, from when there is one: what closes it before is no part of it. */
function layerLines(field: TimeHeightField, scales: FieldScales, frame: Frame): string[] {
  const { peak_km, overPeak, from_h } = layerOutline(field)
  if (Number.isNaN(from_h)) return []
  const left = scales.time(from_h) + CLOSING_STROKE
  const room = { x: left, y: frame.y, width: frame.x + frame.width - left, height: frame.height }
  return [
    element('clipPath', { id: 'layer' }, element('rect', room)),
    drawn(linePath(field.times_h.map(scales.time), peak_km.map(scales.altitude)), { ...PEAK }),
    element(
      'g',
      { 'clip-path': 'url(#layer)' },
      drawn(isoline(overPeak, 0.5, scales), { ...HALF }),
    ),
  ]
}

function altitudeAxis(field: TimeHeightField, frame: Frame): string {
  const { altitudes_km } = field
  const ends = [altitudes_km[0], altitudes_km[altitudes_km.length - 1]]
  const scale = scaleLinear(ends, verticalRange(frame))
  return leftAxis(frame, linearTicks(scale, 6), quantityText('altitude', 'km'))
}

function timeAxis({ times_h }: TimeHeightField, frame: Frame): string {
  const [first, last] = [times_h[0], times_h[times_h.length - 1]]
  const scale = scaleLinear([first, last], horizontalRange(frame))
  return bottomAxis(frame, steppedTicks(scale, hourStep(last - first)), '')
}

/**
 * A map of an amount against time and altitude with the outline of its layer (peak, and half of the peak) and one line
 * of another field. The title of the time axis is left to the panel below.
 */
export function timeHeightMap(field: TimeHeightField, line: Isoline, frame: Frame): string {
  const scales = mapScales(field, frame)
  const { x, y, width, height } = frame
  const bar = { x: x + width + BAR.gap, y, width: BAR.width, height }
  const barTicks = linearTicks(scaleLinear([0, scales.most], verticalRange(bar)), 5)
  const other = isoline(line.field, line.value, scales)
  const entries: LegendEntry[] = [
    { label: 'peak', style: PEAK },
    { label: 'half of the peak', style: HALF },
    { label: line.label, style: ISOLINE },
  ]
  return element(
    'g',
    {},
    element('clipPath', { id: 'map' }, element('rect', { x, y, width, height })),
    element(
      'g',
      { 'clip-path': 'url(#map)' },
      fieldImage(field, scales),
      drawn(other, HALO),
      drawn(other, { ...ISOLINE }),
      ...layerLines(field, scales, frame),
    ),
    element('rect', { x, y, width, height, fill: 'none', stroke: INKS.axis }),
    altitudeAxis(field, frame),
    timeAxis(field, frame),
    colourBar(bar, barTicks, quantityText(field.longName, field.unit)),
    legend(x, y - 8, entries),
  )
}
