/**
 * Changes as users write them in short, QUANTITY:AMOUNT[@Z1..Z2km][@T1..T2h], such as temperature:+1K@82..84km@3..9h.
 */
import { InputError } from '../errors.ts'
import { checkScenario } from '../scenario/checkScenario.ts'
import { complete } from '../scenario/complete.ts'
import { amountKeys } from '../scenario/forcingSchema.ts'
import { nearestWord } from '../scenario/nearestWord.ts'
import { ScenarioError } from '../scenario/problems.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import type { PerturbedQuantity } from '../scenario/types.ts'
import { describePerturbations, type Perturbations } from './describePerturbations.ts'
import { type Amount, EXPECTED_AMOUNTS, parseAmount } from './parseAmount.ts'

export { describePerturbations, type Perturbations } from './describePerturbations.ts'

/** A change of the column, from its short form or from a file. */
export interface Change {
  /** As the user wrote it. */
  text: string
  /** What was understood, in plain words. */
  words: string
  perturbations: Perturbations
}

type PerturbationDocument = Perturbations[number]

const QUANTITIES = Object.keys(amountKeys) as PerturbedQuantity[]
const FORM = 'QUANTITY:AMOUNT[@Z1..Z2km][@T1..T2h], such as temperature:+1K@82..84km@3..9h'

const NUMBER = String.raw`\d+(?:\.\d*)?|\.\d+`
const BAND = new RegExp(`^(${NUMBER})\\.\\.(${NUMBER})\\s*km$`)
const WINDOW = new RegExp(`^(${NUMBER})?\\.\\.(${NUMBER})?\\s*h$`)

/**
 * Reads a change in its short form. A missing band is the whole column, a missing window the whole run; the window
 * `3..h` is from 3 h on, `..9h` up to 9 h. Throws an InputError that says what was read and what was expected.
 */
export function parseChange(text: string): Change {
  const refuse = (message: string): never => {
    throw new InputError(`change '${text}': ${message}`)
  }
  const [head, ...parts] = text.trim().split('@')
  const [word, amountText, ...rest] = head.split(':').map((part) => part.trim())
  if (amountText === undefined || rest.length > 0) return refuse(`expected ${FORM}`)
  const quantity = QUANTITIES.find((name) => name === word)
  if (quantity === undefined) return refuse(unknownQuantity(word))
  const amount = parseAmount(quantity, amountText)
  if (amount === null) {
    return refuse(`read '${amountText}' as the amount; expected ${EXPECTED_AMOUNTS[quantity]}`)
  }
  const perturbation = withPlaceAndTime(quantity, amount, parts, refuse)
  return { text, words: describePerturbations([perturbation]), perturbations: [perturbation] }
}

function unknownQuantity(word: string): string {
  const nearest = nearestWord(word, QUANTITIES)
  const hint = nearest === null ? '' : `; did you mean ${nearest}?`
  return `no quantity '${word}'; expected one of ${QUANTITIES.join(', ')}${hint}`
}

function withPlaceAndTime(
  quantity: PerturbedQuantity,
  amount: Amount,
  parts: readonly string[],
  refuse: (message: string) => never,
): PerturbationDocument {
  const perturbation: PerturbationDocument = { quantity, ...amount, time: { shape: 'always' } }
  for (const part of parts.map((piece) => piece.trim())) {
    const band = BAND.exec(part)
    const window = WINDOW.exec(part)
    if (band !== null && perturbation.altitude === undefined) {
      perturbation.altitude = parseBand(band, refuse)
    } else if (window !== null && perturbation.time.shape === 'always') {
      perturbation.time = parseWindow(window, refuse)
    } else {
      const again = band !== null || window !== null ? ' a second time' : ''
      refuse(
        `read '@${part}'${again}; expected one band such as @82..84km, one time such as @3..9h`,
      )
    }
  }
  return perturbation
}

function parseBand([whole, from, to]: RegExpExecArray, refuse: (message: string) => never) {
  const [from_km, to_km] = [Number(from), Number(to)]
  if (from_km >= to_km) refuse(`band ${whole} is empty; expected the lower altitude first`)
  return { from_km, to_km }
}

function parseWindow(
  [whole, from, to]: RegExpExecArray,
  refuse: (message: string) => never,
): PerturbationDocument['time'] {
  const start_h = Number(from ?? 0)
  if (to === undefined) {
    return from === undefined
      ? refuse(`time '${whole}' has no limits; expected @3..9h, @3..h or @..9h`)
      : { shape: 'step', start_h }
  }
  const end_h = Number(to)
  if (start_h >= end_h) refuse(`time ${whole} is empty; expected the earlier time first`)
  return { shape: 'pulse', start_h, end_h }
}

/**
 * The scenario with a change added to its perturbations. Throws an InputError when a band with sharp edges reaches out
 * of the column (the tails of a Gaussian may), or when the change sets in after the end of the run.
 */
export function changedDocument(
  document: ScenarioDocument,
  change: Pick<Change, 'text' | 'perturbations'>,
): ScenarioDocument {
  const refuse = (message: string): never => {
    throw new InputError(`change '${change.text}': ${message}`)
  }
  const changed = completed(
    { ...document, perturbations: [...document.perturbations, ...change.perturbations] },
    refuse,
  )
  for (const { altitude, time } of changed.perturbations.slice(document.perturbations.length)) {
    refuseOutside(altitude, document, refuse)
    const { start_h = 0, end_h = Number.POSITIVE_INFINITY } = time
    if (start_h >= document.duration_h || end_h <= 0) {
      const times = time.end_h === undefined ? `from ${start_h} h on` : `${start_h} to ${end_h} h`
      refuse(`it acts ${times}, outside the run, which goes from 0 to ${document.duration_h} h`)
    }
  }
  return changed
}

function completed(
  document: ScenarioDocument,
  refuse: (message: string) => never,
): ScenarioDocument {
  try {
    const changed = complete(document)
    const problems = checkScenario(changed)
    if (problems.length > 0) throw new ScenarioError(problems)
    return changed
  } catch (error) {
    if (!(error instanceof InputError)) throw error
    return refuse(error.message)
  }
}

function refuseOutside(
  band: PerturbationDocument['altitude'],
  { grid }: ScenarioDocument,
  refuse: (message: string) => never,
): void {
  const { from_km, to_km } = band ?? {}
  if (from_km === undefined || to_km === undefined) return
  if (from_km >= grid.bottom_km && to_km <= grid.top_km) return
  refuse(
    `the band from ${from_km} to ${to_km} km reaches out of the column; allowed: inside ${grid.bottom_km} to ${grid.top_km} km`,
  )
}
