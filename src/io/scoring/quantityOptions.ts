import { InputError } from '../../model/errors.ts'
import { nearestWord } from '../../model/scenario/nearestWord.ts'

const LARGEST_SEED = 2 ** 32 - 1

/** Reads --threshold QUANTITY=VALUE as often as it was given. */
export function parseThresholds(texts: readonly string[]): Map<string, number> {
  return byQuantity(texts, {
    option: 'threshold',
    expected: 'QUANTITY=VALUE, such as column_ice_ug_per_m2=20',
    read: (value) => numberIn(value),
  })
}

/** Reads --bins QUANTITY=A,B,C, limits between bins, as often as it was given. */
export function parseBins(texts: readonly string[]): Map<string, number[]> {
  return byQuantity(texts, {
    option: 'bins',
    expected: 'QUANTITY=A,B,C with increasing numbers, such as column_ice_ug_per_m2=10,50,100',
    read(value) {
      const limits = value.split(',').map(numberIn)
      const isIncreasing = limits.every(
        (limit, i) => limit !== null && (i === 0 || limit > (limits[i - 1] ?? Infinity)),
      )
      return isIncreasing ? (limits as number[]) : null
    },
  })
}

/** Reads --seed. */
export function parseSeed(text: string): number {
  const seed = text.trim() === '' ? Number.NaN : Number(text)
  if (Number.isInteger(seed) && seed >= 0 && seed <= LARGEST_SEED) return seed
  throw new InputError(`--seed ${text}: expected a whole number from 0 to ${LARGEST_SEED}`)
}

interface Reading<Value> {
  option: string
  expected: string
  /** Null for what is not as expected. */
  read(value: string): Value | null
}

function byQuantity<Value>(
  texts: readonly string[],
  { option, expected, read }: Reading<Value>,
): Map<string, Value> {
  const values = new Map<string, Value>()
  for (const text of texts) {
    const [, quantity, valueText] = /^\s*([^=\s]+)\s*=(.*)$/.exec(text) ?? []
    const value = quantity === undefined ? null : read(valueText)
    if (value === null) throw new InputError(`--${option} ${text}: expected ${expected}`)
    if (values.has(quantity))
      throw new InputError(`--${option} ${text}: ${quantity} was given more than once`)
    values.set(quantity, value)
  }
  return values
}

function numberIn(text: string): number | null {
  const value = text.trim() === '' ? Number.NaN : Number(text)
  return Number.isFinite(value) ? value : null
}

/** Refuses an option for a quantity that is not scored. */
export function refuseUnscored(
  option: string,
  names: Iterable<string>,
  scored: readonly string[],
): void {
  for (const name of names) {
    if (scored.includes(name)) continue
    const nearest = nearestWord(name, scored)
    const hint = nearest === null ? '' : `; did you mean ${nearest}?`
    throw new InputError(
      `--${option} ${name}: no such quantity is scored; scored: ${scored.join(', ')}${hint}`,
    )
  }
}
