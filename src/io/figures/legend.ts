import { element, words } from './element.ts'
import { INKS } from './inks.ts'

/** How a line is drawn. */
export interface LineStyle {
  stroke: string
  'stroke-width': number
  'stroke-dasharray'?: string
}

export interface LegendEntry {
  label: string
  style: LineStyle
}

const SAMPLE = 26
const GAP = 6
const CHARACTER = 6.3
const BETWEEN = 20

/** Samples of lines with their meaning, in a row. */
export function legend(x: number, y: number, entries: readonly LegendEntry[]): string {
  let left = x
  const parts = entries.flatMap(({ label, style }) => {
    const from = left
    left += SAMPLE + GAP + label.length * CHARACTER + BETWEEN
    return [
      element('line', { x1: from, y1: y - 4, x2: from + SAMPLE, y2: y - 4, ...style }),
      words('text', { x: from + SAMPLE + GAP, y, fill: INKS.words, 'font-size': 12 }, label),
    ]
  })
  return element('g', {}, ...parts)
}
