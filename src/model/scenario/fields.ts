/**
 * The kinds of value that scenario keys hold. Each builder writes the key's documentation from its parts:
 * meaning, unit, default and the reason of the default.
 */
import { z } from 'zod'
import type { Default } from './defaults.ts'

/** Bounds of a number: above (exclusive) or from (inclusive), and to (inclusive). */
interface Bounds {
  unit?: string
  above?: number
  from?: number
  to: number
}

const SHOWN_DIGITS = 6
/** Numbers from here on are shown with an exponent. */
const LARGE = 1e7

function shown(value: unknown): string {
  if (typeof value === 'number') {
    return value < LARGE ? String(Number(value.toPrecision(SHOWN_DIGITS))) : value.toExponential()
  }
  return typeof value === 'string' ? value : JSON.stringify(value)
}

function described(meaning: string, unit: string | undefined, fallback?: Default<unknown>): string {
  const subject = unit === undefined ? meaning : `${meaning}, ${unit}`
  return fallback === undefined
    ? `${subject}.`
    : `${subject}. Default ${shown(fallback.value)}: ${fallback.reason}.`
}

function bounded(number: z.ZodNumber, { above, from, to }: Bounds): z.ZodNumber {
  if (above !== undefined) return number.gt(above).lte(to)
  return from === undefined ? number.lte(to) : number.gte(from).lte(to)
}

/** A number that the user must give. */
export function given(meaning: string, bounds: Bounds): z.ZodNumber {
  return bounded(z.number(), bounds).describe(described(meaning, bounds.unit))
}

/** A number that may be left out; `absent` says what then holds. */
export function optionalNumber(meaning: string, bounds: Bounds, absent: string) {
  return bounded(z.number(), bounds)
    .optional()
    .describe(`${described(meaning, bounds.unit)} ${absent}.`)
}

export function quantity(meaning: string, bounds: Bounds, fallback: Default<number>) {
  return bounded(z.number(), bounds)
    .default(fallback.value)
    .describe(described(meaning, bounds.unit, fallback))
}

export function wholeNumber(meaning: string, bounds: Bounds, fallback: Default<number>) {
  return bounded(z.int(), bounds)
    .default(fallback.value)
    .describe(described(meaning, bounds.unit, fallback))
}

/** A list of instants, in any order. */
export function instants(meaning: string, bounds: Bounds, fallback: Default<number[]>) {
  return z
    .array(bounded(z.number(), bounds))
    .max(10_000)
    .default(fallback.value)
    .describe(described(meaning, bounds.unit, fallback))
}

/** Least and greatest value, as a list of two numbers. */
export function span(meaning: string, bounds: Bounds, fallback: Default<number[]>) {
  return z
    .array(bounded(z.number(), bounds))
    .length(2)
    .default(fallback.value)
    .describe(described(meaning, bounds.unit, fallback))
}

export function choice<const T extends readonly string[]>(
  meaning: string,
  options: T,
  fallback: Default<T[number]>,
) {
  return z
    .enum(options as unknown as { [K in T[number]]: K })
    .default(fallback.value as never)
    .describe(described(`${meaning}: one of ${options.join(', ')}`, undefined, fallback))
}

export function toggle(meaning: string, fallback: Default<boolean>) {
  return z
    .boolean()
    .default(fallback.value)
    .describe(described(meaning, undefined, fallback))
}

/** A record whose keys all have defaults, so that it may be left out. */
export function section<T extends z.ZodRawShape>(meaning: string, shape: T) {
  return z
    .strictObject(shape)
    .prefault({} as never)
    .describe(`${meaning}.`)
}

export const altitude = (meaning: string) => given(meaning, { unit: 'km', from: 0, to: 150 })
