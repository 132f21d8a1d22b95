import { amountKeys } from '../scenario/forcingSchema.ts'
import type { PerturbedQuantity } from '../scenario/types.ts'

type AmountKey = (typeof amountKeys)[PerturbedQuantity]

/** How much a perturbation changes: an amount in the unit of its key, or a factor. */
export type Amount = Partial<Record<AmountKey | 'factor', number>>

/** Units in which each quantity can be added to, as factors to the unit of its key. */
const units: Record<PerturbedQuantity, Record<string, number>> = {
  temperature: { K: 1 },
  water: { ppmv: 1 },
  wind: { 'cm/s': 1, 'm/s': 100 },
  mixing: { 'm2/s': 1 },
  nuclei: { '/cm3': 1 },
}

/** What an amount of each quantity looks like, for messages. */
export const EXPECTED_AMOUNTS: Record<PerturbedQuantity, string> = {
  temperature: 'an amount with sign and unit or a factor, such as +1K, -0.5K, +1% or x1.01',
  water: 'an amount with sign and unit or a factor, such as +0.5ppmv, +10% or x1.2',
  wind: 'an amount with sign and unit or a factor, such as +0.01m/s, +1cm/s, +10% or x1.2',
  mixing: 'an amount with sign and unit or a factor, such as +5m2/s, +10% or x1.2',
  nuclei: 'an amount with sign and unit or a factor, such as +100/cm3, +10% or x1.2',
}

const NUMBER = String.raw`(?:\d+(?:\.\d*)?|\.\d+)(?:e[+-]?\d+)?`
const ADDED = new RegExp(`^([+-]${NUMBER})\\s*(\\D.*)$`, 'i')
const FACTOR = new RegExp(`^x\\s*([+-]?${NUMBER})$`, 'i')

/** Digits that a conversion by a power of ten keeps exactly: 0.07 m/s is 7 cm/s, not 7.000000000000001. */
const DECIMAL_DIGITS = 15

function decimal(value: number): number {
  return Number(value.toPrecision(DECIMAL_DIGITS))
}

/** Reads '+1K', '+10%' or 'x1.2' as an amount of a quantity; null when it is none. */
export function parseAmount(quantity: PerturbedQuantity, text: string): Amount | null {
  const factor = FACTOR.exec(text)
  if (factor !== null) return finite({ factor: Number(factor[1]) })
  const added = ADDED.exec(text)
  if (added === null) return null
  const [, number, unit] = added
  const value = Number(number)
  if (unit === '%') return finite({ factor: decimal(1 + value / 100) })
  const scale = Object.hasOwn(units[quantity], unit) ? units[quantity][unit] : null
  return scale === null ? null : finite({ [amountKeys[quantity]]: decimal(value * scale) + 0 })
}

function finite(amount: Amount): Amount | null {
  return Object.values(amount).every(Number.isFinite) ? amount : null
}
