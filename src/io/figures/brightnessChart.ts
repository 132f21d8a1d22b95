import { type ScaleLinear, type ScaleLogarithmic, scaleLinear, scaleLog } from 'd3-scale'
import { bottomAxis, leftAxis } from './axis.ts'
import { element, words } from './element.ts'
import { type Frame, horizontalRange, verticalRange } from './frame.ts'
import { INKS } from './inks.ts'
import { type LegendEntry, type LineStyle, legend } from './legend.ts'
import { linePath } from './linePath.ts'
import { decadeTicks, hourStep, steppedTicks } from './ticks.ts'
import { quantityText } from './unitText.ts'

/** Brightness of one channel against time, once for each law of scattering. */
export interface ChannelSeries {
  label: string
  rayleigh: Float64Array
  mie: Float64Array
}

export interface BrightnessSeries {
  times_h: Float64Array
  unit: string
  channels: ChannelSeries[]
}

/** Decades below the brightest value that are shown: what is fainter no instrument sees. */
const DECADES = 4
const COLOURS = [INKS.first, INKS.second]
const DASHES = '5 3'

interface ChartScales {
  time: ScaleLinear<number, number>
  brightness: ScaleLogarithmic<number, number>
}

function chartScales({ times_h, channels }: BrightnessSeries, frame: Frame): ChartScales {
  const largest = Math.max(...channels.flatMap(({ rayleigh, mie }) => [...rayleigh, ...mie]), 1e-30)
  const top = 10 ** Math.ceil(Math.log10(largest))
  const domain = [times_h[0], times_h[times_h.length - 1]]
  return {
    time: scaleLinear(domain, horizontalRange(frame)),
    brightness: scaleLog([top / 10 ** DECADES, top], verticalRange(frame)),
  }
}

/** A line leaves the chart where it falls below its floor. */
function curve(
  times_h: Float64Array,
  values: Float64Array,
  { time, brightness }: ChartScales,
  style: LineStyle,
): string {
  const ys = values.map((value) => (value > 0 ? brightness(value) : Number.NaN))
  return element('path', { d: linePath(times_h.map(time), ys), fill: 'none', ...style })
}

function styleOf(channel: number): LineStyle {
  return { stroke: COLOURS[channel % COLOURS.length], 'stroke-width': 2 }
}

function channelCurves({ times_h, channels }: BrightnessSeries, scales: ChartScales): string[] {
  return channels.flatMap(({ rayleigh, mie }, i) => [
    curve(times_h, rayleigh, scales, styleOf(i)),
    curve(times_h, mie, scales, { ...styleOf(i), 'stroke-dasharray': DASHES }),
  ])
}

/** The name of a channel beside the end of its curves. */
function channelNames({ channels }: BrightnessSeries, frame: Frame, scales: ChartScales): string[] {
  const x = frame.x + frame.width + 8
  return channels.map(({ label, rayleigh, mie }, i) => {
    const ends = [rayleigh, mie].map((values) => values[values.length - 1])
    const middle = Math.sqrt(ends[0] * ends[1])
    const y = middle > scales.brightness.domain()[0] ? scales.brightness(middle) + 4 : frame.y + 12
    const ink = styleOf(i).stroke
    return words('text', { x, y, fill: ink, 'font-size': 12, 'font-weight': 'bold' }, label)
  })
}

const LAWS: LegendEntry[] = [
  {
    label: 'Rayleigh (upper bound)',
    style: { stroke: INKS.axis, 'stroke-width': 2 },
  },
  {
    label: 'Lorenz-Mie spheres',
    style: { stroke: INKS.axis, 'stroke-width': 2, 'stroke-dasharray': DASHES },
  },
]

/** Brightness over the whole column against time, on a logarithmic scale. */
export function brightnessChart(series: BrightnessSeries, frame: Frame): string {
  const scales = chartScales(series, frame)
  const { x, y, width, height } = frame
  const decades = decadeTicks(scales.brightness)
  const [first, last] = scales.time.domain()
  const hours = steppedTicks(scales.time, hourStep(last - first))
  const rules = decades.map(({ at }) =>
    element('line', { x1: x, y1: at, x2: x + width, y2: at, stroke: INKS.grid }),
  )
  return element(
    'g',
    {},
    element('clipPath', { id: 'chart' }, element('rect', { x, y, width, height })),
    ...rules,
    element('g', { 'clip-path': 'url(#chart)' }, ...channelCurves(series, scales)),
    element('rect', { x, y, width, height, fill: 'none', stroke: INKS.axis }),
    leftAxis(frame, decades, quantityText('brightness', series.unit)),
    bottomAxis(frame, hours, quantityText('time since the start of the run', 'h')),
    ...channelNames(series, frame, scales),
    legend(x, y - 8, LAWS),
  )
}
