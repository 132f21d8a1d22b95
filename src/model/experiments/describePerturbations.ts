import { amountKeys } from '../scenario/forcingSchema.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import type { PerturbedQuantity } from '../scenario/types.ts'

export type Perturbations = ScenarioDocument['perturbations']
type PerturbationDocument = Perturbations[number]

const names: Record<PerturbedQuantity, string> = {
  temperature: 'temperature',
  water: 'water vapour',
  wind: 'vertical wind',
  mixing: 'eddy diffusivity',
  nuclei: 'number of nuclei',
}

/** Unit in which each quantity is added to, as users read it. */
export const amountUnits: Record<PerturbedQuantity, string> = {
  temperature: 'K',
  water: 'ppmv',
  wind: 'cm/s',
  mixing: 'm2/s',
  nuclei: '/cm3',
}

/** Perturbations in plain words, such as 'temperature raised by 1 K between 82 and 84 km, from 3 to 9 h'. */
export function describePerturbations(perturbations: Perturbations): string {
  if (perturbations.length === 0) return 'no change'
  return perturbations
    .map((change) => `${amountWords(change)} ${bandWords(change.altitude)}, ${timeWords(change)}`)
    .join('; ')
}

function amountWords(change: PerturbationDocument): string {
  const { quantity, factor } = change
  const name = names[quantity]
  if (factor !== undefined) return `${name} multiplied by ${shown(factor)}${asPercent(factor)}`
  const amount = change[amountKeys[quantity]] ?? 0
  const verb = amount > 0 ? 'raised' : amount < 0 ? 'lowered' : 'changed'
  return `${name} ${verb} by ${shown(Math.abs(amount))} ${amountUnits[quantity]}`
}

function asPercent(factor: number): string {
  const percent = shown((factor - 1) * 100)
  return factor > 0 && factor < 2 ? ` (${factor < 1 ? '' : '+'}${percent} %)` : ''
}

function bandWords(band: PerturbationDocument['altitude']): string {
  const { from_km, to_km, centre_km, width_km } = band ?? {}
  if (from_km !== undefined && to_km !== undefined) return `between ${from_km} and ${to_km} km`
  if (centre_km === undefined || width_km === undefined) return 'in the whole column'
  return `around ${centre_km} km (Gaussian, ${width_km} km wide at half maximum)`
}

function timeWords({ time }: PerturbationDocument): string {
  const { shape, start_h = 0, end_h, rise_h } = time
  if (shape === 'always') return 'during the whole run'
  const window = end_h === undefined ? `from ${start_h} h on` : `from ${start_h} to ${end_h} h`
  if (shape !== 'ramp') return window
  return `${window}, rising ${end_h === undefined ? '' : 'and falling '}over ${rise_h} h`
}

const SHOWN_DIGITS = 6

function shown(value: number): string {
  return String(Number(value.toPrecision(SHOWN_DIGITS)))
}
