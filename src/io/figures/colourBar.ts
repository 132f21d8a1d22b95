import { rightAxis, type Tick } from './axis.ts'
import { colourMap, cssColour } from './colourMap.ts'
import { element } from './element.ts'
import type { Frame } from './frame.ts'
import { INKS } from './inks.ts'

const STOPS = 16

/** The colours of a field from its least value at the bottom to its largest, with their axis. */
export function colourBar(frame: Frame, ticks: readonly Tick[], title: string): string {
  const stops = Array.from({ length: STOPS + 1 }, (_, i) =>
    element('stop', { offset: i / STOPS, 'stop-color': cssColour(colourMap(i / STOPS)) }),
  )
  const { x, y, width, height } = frame
  return element(
    'g',
    {},
    element('linearGradient', { id: 'amount', x1: 0, y1: 1, x2: 0, y2: 0 }, ...stops),
    element('rect', { x, y, width, height, fill: 'url(#amount)', stroke: INKS.axis }),
    rightAxis(frame, ticks, title),
  )
}
