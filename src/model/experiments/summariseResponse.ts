import type { ScenarioDocument } from '../scenario/schema.ts'
import type { ResponseRow } from './compareHeadlines.ts'

/** The course of a response in numbers; null where there is no response to speak of. */
export interface ResponseSummary {
  quantity: string
  channel: string | null
  /** The difference that is farthest from zero, with its sign, in the unit of the quantity. */
  largest: number | null
  /** The same relative to the control at that time. */
  largest_relative: number | null
  largest_at_h: number | null
  /** Integral of the difference over time, in the unit of the quantity times hours. */
  integrated: number | null
  /** From the onset of the change to half of the largest response, h. */
  delay_h: number | null
  /** Time during which the response is above half of its largest, h. */
  duration_h: number | null
  /** Largest numerical floor of the difference. */
  floor: number | null
  /** Whether the largest response is above the floor; null where no floor was measured. */
  above_floor: boolean | null
}

/** When the earliest of the perturbations sets in, h; 0 for what holds from the start. */
export function onsetOf(perturbations: ScenarioDocument['perturbations']): number {
  const starts = perturbations.map(({ time }) => Math.max(time.start_h ?? 0, 0))
  return starts.length === 0 ? 0 : Math.min(...starts)
}

/**
 * The summary of a response, one per quantity and channel. Between output times the difference is taken as linear.
 *
 * @param onset_h when the change sets in; delays count from there
 */
export function summariseResponse(rows: readonly ResponseRow[], onset_h = 0): ResponseSummary[] {
  const groups = new Map<string, ResponseRow[]>()
  for (const row of rows) {
    const key = `${row.quantity} ${row.channel}`
    const group = groups.get(key)
    if (group === undefined) groups.set(key, [row])
    else group.push(row)
  }
  return [...groups.values()].map((group) => summarise(group, onset_h))
}

interface Point {
  time_h: number
  difference: number
}

function summarise(rows: readonly ResponseRow[], onset_h: number): ResponseSummary {
  const { quantity, channel } = rows[0]
  const largest = rows.reduce((most, row) => (size(row) > size(most) ? row : most))
  const floors = rows.flatMap(({ floor }) => floor ?? [])
  const floor = floors.length === 0 ? null : Math.max(...floors)
  const spans = spansOf(rows)
  const half = size(largest) / 2
  const reached = half > 0 ? firstAbove(spans, half) : null
  return {
    quantity,
    channel,
    largest: largest.difference,
    largest_relative: largest.relative,
    largest_at_h: half > 0 ? largest.time_h : null,
    integrated: spans.length === 0 ? null : sum(spans, integral),
    delay_h: reached === null ? null : Math.max(reached - onset_h, 0),
    duration_h: half > 0 ? sum(spans, (from, to) => timeAbove(from, to, half)) : null,
    floor,
    above_floor: floor === null || largest.difference === null ? null : size(largest) > floor,
  }
}

function size({ difference }: ResponseRow): number {
  return difference === null ? -1 : Math.abs(difference)
}

/** Pairs of neighbouring output times at both of which there is a difference. */
function spansOf(rows: readonly ResponseRow[]): [Point, Point][] {
  return rows.slice(1).flatMap((row, i): [Point, Point][] => {
    const [from, to] = [rows[i].difference, row.difference]
    if (from === null || to === null) return []
    return [
      [
        { time_h: rows[i].time_h, difference: from },
        { time_h: row.time_h, difference: to },
      ],
    ]
  })
}

function sum(spans: readonly [Point, Point][], amount: (from: Point, to: Point) => number): number {
  return spans.reduce((total, [from, to]) => total + amount(from, to), 0)
}

function integral(from: Point, to: Point): number {
  return ((from.difference + to.difference) / 2) * (to.time_h - from.time_h)
}

/** Where a line between two sizes crosses a level, as a share of the way. */
function crossing(from: number, to: number, level: number): number {
  return (level - from) / (to - from)
}

function firstAbove(spans: readonly [Point, Point][], level: number): number | null {
  for (const [from, to] of spans) {
    const [before, after] = [Math.abs(from.difference), Math.abs(to.difference)]
    if (before >= level) return from.time_h
    if (after >= level) {
      return from.time_h + crossing(before, after, level) * (to.time_h - from.time_h)
    }
  }
  return null
}

/** Time in a span with |difference| above a level. */
function timeAbove(from: Point, to: Point, level: number): number {
  const length = to.time_h - from.time_h
  const [before, after] = [Math.abs(from.difference), Math.abs(to.difference)]
  if (before >= level && after >= level) return length
  if (before < level && after < level) return 0
  const share = crossing(before, after, level)
  return length * (before >= level ? share : 1 - share)
}
