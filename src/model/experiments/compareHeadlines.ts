import { InputError } from '../errors.ts'
import type { HeadlineSeries, Headlines } from './headlines.ts'

/** One quantity of two runs at one time; what does not apply is null. */
export interface ResponseRow {
  time_h: number
  quantity: string
  /** Name of the channel, or null for what has none. */
  channel: string | null
  control: number | null
  changed: number | null
  /** changed - control. */
  difference: number | null
  /** difference/control; null where the control is zero or below its own numerical floor. */
  relative: number | null
  /** How much the difference moves when both runs are integrated more tightly; null where that was not done. */
  floor: number | null
}

/** Two runs, one of them changed. */
export interface HeadlinePair {
  control: Headlines
  changed: Headlines
}

/**
 * The response of a run to a change in long form, by time, then quantity and channel, for all that both runs have.
 * Throws an InputError when their output times differ.
 *
 * @param floor the same two runs integrated more tightly
 */
export function compareHeadlines(
  control: Headlines,
  changed: Headlines,
  floor?: HeadlinePair,
): ResponseRow[] {
  const others = floor === undefined ? [changed] : [changed, floor.control, floor.changed]
  for (const other of others) refuseOtherTimes(control.time_h, other.time_h)
  const compared = control.series.flatMap((series) => {
    const partner = find(changed, series)
    if (partner === undefined) return []
    const tight = floor && {
      control: find(floor.control, series),
      changed: find(floor.changed, series),
    }
    return [{ series, partner, tight }]
  })
  return control.time_h.flatMap((time_h, i) =>
    compared.map(({ series, partner, tight }) => {
      const pair = { control: series.values[i], changed: partner.values[i] }
      const tightPair = tight && {
        control: tight.control?.values[i] ?? Number.NaN,
        changed: tight.changed?.values[i] ?? Number.NaN,
      }
      return {
        time_h,
        quantity: series.quantity,
        channel: series.channel,
        ...respond(pair, tightPair),
      }
    }),
  )
}

interface Values {
  control: number
  changed: number
}

function respond(
  { control, changed }: Values,
  tight: Values | undefined,
): Omit<ResponseRow, 'time_h' | 'quantity' | 'channel'> {
  const difference = changed - control
  const floor = tight && Math.abs(difference - (tight.changed - tight.control))
  const controlFloor = tight === undefined ? 0 : Math.abs(control - tight.control)
  return {
    control: orNull(control),
    changed: orNull(changed),
    difference: orNull(difference),
    relative: Math.abs(control) > controlFloor ? orNull(difference / control) : null,
    floor: floor === undefined ? null : orNull(floor),
  }
}

function find(headlines: Headlines, { quantity, channel }: HeadlineSeries) {
  return headlines.series.find(
    (series) => series.quantity === quantity && series.channel === channel,
  )
}

/** Output times may differ by rounding. */
const SAME_TIME_H = 1e-9

function refuseOtherTimes(control: readonly number[], changed: readonly number[]): void {
  const unequal = control.findIndex((time, i) => !(Math.abs(time - changed[i]) < SAME_TIME_H))
  if (unequal < 0 && control.length === changed.length) return
  const place = unequal < 0 ? control.length : unequal
  throw new InputError(
    `the output times differ: number ${place + 1} is ${timeText(control[place])} in the control and ${timeText(changed[place])} in the changed run; expected equal ones`,
  )
}

function timeText(time_h: number | undefined): string {
  return time_h === undefined ? 'missing' : `${time_h} h`
}

function orNull(value: number): number | null {
  return Number.isFinite(value) ? value : null
}
