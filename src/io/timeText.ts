import { InputError } from '../model/errors.ts'

const SECONDS_PER_UNIT: Record<string, number> = {
  s: 1,
  min: 60,
  h: 3600,
  d: 86_400,
}

/** Seconds meant by a time such as `12h`, `90min`, `3600s`, `2d`, or a bare number of hours. */
export function parseTime(text: string): number {
  const [, number, unit = 'h'] = /^\s*([0-9.eE+-]+)\s*(s|min|h|d)?\s*$/.exec(text) ?? []
  const time_s = Number(number) * SECONDS_PER_UNIT[unit]
  if (number === undefined || !Number.isFinite(time_s) || time_s < 0)
    throw new InputError(`'${text}' is not a time; write 12h, 90min, 3600s or 2d`)
  return time_s
}

/** A time in hours, without trailing noise. */
export function formatTime(time_s: number): string {
  return `${Number((time_s / 3600).toPrecision(6))} h`
}
