import { InputError } from '../errors.ts'
import { amountKeys } from '../scenario/forcingSchema.ts'
import { resolve } from '../scenario/resolve.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import type { PerturbedQuantity } from '../scenario/types.ts'
import { outputTimes, prepareColumn } from '../simulate.ts'
import { HOUR } from '../units.ts'
import { alignedPair } from './alignedPair.ts'
import { changedDocument } from './change.ts'
import { amountUnits, describePerturbations, type Perturbations } from './describePerturbations.ts'
import { lookedAt } from './lookedAt.ts'
import { type Amount, EXPECTED_AMOUNTS, parseAmount } from './parseAmount.ts'
import type {
  Look,
  ResponseMapCell,
  ResponseMapMember,
  ResponseMapOptions,
  ResponseMapPlan,
} from './responseMapPlan.ts'
import { tightened } from './tightened.ts'

/** Small enough to be nearly linear, large enough to stand above the noise of the integration. Invented. */
const defaultAmounts: Record<PerturbedQuantity, string> = {
  temperature: '+1K',
  water: '+5%',
  wind: '+0.5cm/s',
  mixing: '+10%',
  nuclei: '+10%',
}

const MOST_CELLS = 10_000

/**
 * The runs of a response map: the control, and per cell a pulse in a band with sharp edges, half of it, and the pulse
 * with tighter tolerances; all with equal break points. Throws an InputError for a lattice that does not fit the column.
 */
export function planResponseMap(
  document: ScenarioDocument,
  options: ResponseMapOptions,
): ResponseMapPlan {
  const { quantity, duration_h } = options
  const text = options.amount ?? defaultAmounts[quantity]
  const amount = parseAmount(quantity, text)
  if (amount === null) {
    throw new InputError(`amount '${text}': expected ${EXPECTED_AMOUNTS[quantity]}`)
  }
  const { size, per } = sizeOf(quantity, amount)
  if (size === 0) throw new InputError(`amount '${text}' changes nothing; expected one that does`)
  if (!(duration_h > 0)) throw new InputError(`duration ${duration_h} h; expected above 0`)
  const cells = makeCells(document, options)
  const when = checkLook(document, options.when ?? { at_h: document.duration_h })
  const change = (cell: ResponseMapCell, share: number) =>
    changedDocument(document, {
      text: `${quantity}:${text}@${cell.band_km.join('..')}km`,
      perturbations: [pulse(quantity, scaled(amount, share), cell, duration_h)],
    })
  const full = cells.map((cell) => change(cell, 1))
  const half = cells.map((cell) => change(cell, 1 / 2))
  const { control, changed } = alignedPair(document, [...full, ...half])
  const members = makeMembers(control, changed.slice(0, full.length), changed.slice(full.length))
  const words = `${describePerturbations([pulse(quantity, amount, cells[0], duration_h)])}, and so on in ${cells.length} cells`
  return { control, cells, members, per, amount: size, when, words }
}

function makeMembers(
  control: ScenarioDocument,
  full: readonly ScenarioDocument[],
  half: readonly ScenarioDocument[],
): ResponseMapMember[] {
  return [
    { role: 'control', cell: null, document: control },
    { role: 'tight control', cell: null, document: tightened(control) },
    ...full.flatMap((document, cell): ResponseMapMember[] => [
      { role: 'changed', cell, document },
      { role: 'half', cell, document: half[cell] },
      { role: 'tight changed', cell, document: tightened(document) },
    ]),
  ]
}

/** Size of a change in the unit that its response is counted per. */
function sizeOf(quantity: PerturbedQuantity, { factor, ...added }: Amount) {
  return factor === undefined
    ? { size: added[amountKeys[quantity]] ?? 0, per: amountUnits[quantity] }
    : { size: (factor - 1) * 100, per: 'percent' }
}

function scaled({ factor, ...added }: Amount, share: number): Amount {
  if (factor !== undefined) return { factor: 1 + (factor - 1) * share }
  return Object.fromEntries(Object.entries(added).map(([key, value]) => [key, value * share]))
}

function pulse(
  quantity: PerturbedQuantity,
  amount: Amount,
  { band_km: [from_km, to_km], onset_h }: ResponseMapCell,
  duration_h: number,
): Perturbations[number] {
  return {
    quantity,
    ...amount,
    altitude: { from_km, to_km },
    time: { shape: 'pulse', start_h: onset_h, end_h: decimal(onset_h + duration_h) },
  }
}

function makeCells(
  { grid, duration_h }: ScenarioDocument,
  { bands_km, onsets_h }: ResponseMapOptions,
): ResponseMapCell[] {
  const edges = lattice('bands', bands_km, 'km')
  const onsets = lattice('onsets', onsets_h, 'h')
  const spacing_km = (grid.top_km - grid.bottom_km) / grid.levels
  if (edges.length < 2) {
    throw new InputError(`bands from ${bands_km[0]} to ${bands_km[1]} km are empty; expected one`)
  }
  if (bands_km[2] < spacing_km) {
    throw new InputError(
      `bands of ${bands_km[2]} km are thinner than a level; allowed: from ${spacing_km} km on`,
    )
  }
  if (onsets[onsets.length - 1] >= duration_h) {
    throw new InputError(
      `the onset at ${onsets[onsets.length - 1]} h is not inside the run; allowed: below ${duration_h} h`,
    )
  }
  const count = (edges.length - 1) * onsets.length
  if (count > MOST_CELLS) {
    throw new InputError(`${count} cells; allowed: up to ${MOST_CELLS}`)
  }
  return edges
    .slice(1)
    .flatMap((top, i) =>
      onsets.map((onset_h): ResponseMapCell => ({ band_km: [edges[i], top], onset_h })),
    )
}

const LATTICE_ROUNDING = 1e-6

/** From, from + step, ..., to. */
function lattice(
  name: string,
  [from, to, step]: readonly [number, number, number],
  unit: string,
): number[] {
  const steps = from === to ? 0 : (to - from) / step
  const count = Math.round(steps)
  const fits =
    [from, to].every(Number.isFinite) && from >= 0 && to >= from && (step > 0 || to === from)
  if (!fits || Math.abs(steps - count) > LATTICE_ROUNDING) {
    throw new InputError(
      `${name} from ${from} to ${to} ${unit} in steps of ${step} ${unit}; expected 0 <= from <= to and whole steps between`,
    )
  }
  return Array.from({ length: count + 1 }, (_, i) => decimal(from + i * step))
}

const DECIMAL_DIGITS = 12

/** Without the last digits that repeated addition spoils. */
function decimal(value: number): number {
  return Number(value.toPrecision(DECIMAL_DIGITS))
}

function checkLook(document: ScenarioDocument, when: Look): Look {
  const times_h = [
    0,
    ...outputTimes(prepareColumn(resolve(document).scenario)).map((t) => t / HOUR),
  ]
  if (lookedAt(times_h, when).length > 0) return when
  const asked = 'at_h' in when ? `at ${when.at_h} h` : `from ${when.mean_h.join(' to ')} h`
  throw new InputError(
    `no output ${asked}; output comes every ${document.output_every_min} min up to ${document.duration_h} h`,
  )
}
