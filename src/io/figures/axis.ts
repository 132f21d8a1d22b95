import { element, words } from './element.ts'
import type { Frame } from './frame.ts'
import { INKS } from './inks.ts'

/** A mark of an axis: where it stands, in pixels, and what it says (nothing for a small one). */
export interface Tick {
  at: number
  label: string
}

const TICK = 5
const GAP = 8
const WORDS = { fill: INKS.words, 'font-size': 12 } as const

function line(x1: number, y1: number, x2: number, y2: number): string {
  return element('line', { x1, y1, x2, y2, stroke: INKS.axis })
}

/** An axis below a frame. */
export function bottomAxis(frame: Frame, ticks: readonly Tick[], title: string): string {
  const base = frame.y + frame.height
  const marks = ticks.flatMap(({ at, label }) => [
    line(at, base, at, base + TICK),
    words('text', { x: at, y: base + TICK + 13, 'text-anchor': 'middle', ...WORDS }, label),
  ])
  const middle = frame.x + frame.width / 2
  const name = words('text', { x: middle, y: base + 36, 'text-anchor': 'middle', ...WORDS }, title)
  return element('g', {}, ...marks, ...(title === '' ? [] : [name]))
}

/** A title along a vertical axis, read from below. */
function standing(x: number, y: number, title: string): string {
  const turn = `rotate(-90 ${x.toFixed(1)} ${y.toFixed(1)})`
  return words('text', { x, y, transform: turn, 'text-anchor': 'middle', ...WORDS }, title)
}

/** An axis on the left of a frame. */
export function leftAxis(frame: Frame, ticks: readonly Tick[], title: string): string {
  const marks = ticks.flatMap(({ at, label }) => [
    line(frame.x - TICK, at, frame.x, at),
    words('text', { x: frame.x - GAP, y: at + 4, 'text-anchor': 'end', ...WORDS }, label),
  ])
  return element('g', {}, ...marks, standing(frame.x - 46, frame.y + frame.height / 2, title))
}

/** An axis on the right of a frame. */
export function rightAxis(frame: Frame, ticks: readonly Tick[], title: string): string {
  const edge = frame.x + frame.width
  const marks = ticks.flatMap(({ at, label }) => [
    line(edge, at, edge + TICK, at),
    words('text', { x: edge + GAP, y: at + 4, ...WORDS }, label),
  ])
  return element('g', {}, ...marks, standing(edge + 44, frame.y + frame.height / 2, title))
}
