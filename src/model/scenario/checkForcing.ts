/**
 * Checks of waves and perturbations that need more than one key.
 */
import { amountKeys } from './forcingSchema.ts'
import { type Path, problem, type ScenarioProblem } from './problems.ts'
import type { ScenarioDocument } from './schema.ts'

type Perturbation = ScenarioDocument['perturbations'][number]

export function checkForcing(document: ScenarioDocument): ScenarioProblem[] {
  const random = document.random_waves
  return [
    ...document.waves.flatMap((wave, i) => checkWindow(['waves', i], wave)),
    ...(random === undefined ? [] : checkRandomWaves(random)),
    ...document.perturbations.flatMap((change, i) =>
      checkPerturbation(['perturbations', i], change),
    ),
  ]
}

function checkRandomWaves(random: NonNullable<ScenarioDocument['random_waves']>) {
  const spans = (['periods_h', 'vertical_wavelengths_km'] as const).filter(
    (key) => random[key][0] > random[key][1],
  )
  return [
    ...spans.map((key) =>
      problem(
        ['random_waves', key],
        `[${random[key].join(', ')}] is not allowed; allowed: the lesser value first`,
      ),
    ),
    ...checkWindow(['random_waves'], random),
  ]
}

interface Window {
  start_h: number
  end_h?: number | undefined
  rise_h: number
}

/** A window has to be long enough to rise and to fall. */
function checkWindow(path: Path, { start_h, end_h, rise_h }: Window): ScenarioProblem[] {
  if (end_h === undefined || (end_h > start_h && end_h >= start_h + 2 * rise_h)) return []
  const least = start_h + 2 * rise_h
  return [
    problem(
      [...path, 'end_h'],
      `${end_h} is not allowed; allowed: after start_h ${start_h}, with room for rise and fall (rise_h ${rise_h}), so from ${least} on`,
    ),
  ]
}

function checkPerturbation(path: Path, change: Perturbation): ScenarioProblem[] {
  return [
    ...checkAmount(path, change),
    ...checkBand([...path, 'altitude'], change.altitude),
    ...checkCourse([...path, 'time'], change.time),
  ]
}

function checkAmount(path: Path, change: Perturbation): ScenarioProblem[] {
  const own = amountKeys[change.quantity]
  const foreign = Object.values(amountKeys).find((key) => key !== own && change[key] !== undefined)
  if (foreign !== undefined) {
    return [
      problem(
        [...path, foreign],
        `does not fit quantity ${change.quantity}; allowed: ${own} or factor`,
      ),
    ]
  }
  if ((change[own] === undefined) === (change.factor === undefined)) {
    return [problem(path, `needs ${own} or factor, one of them`)]
  }
  const least = change.quantity === 'wind' ? -Infinity : 0
  if (change.factor !== undefined && change.factor < least) {
    return [problem([...path, 'factor'], `${change.factor} is not allowed; allowed: 0 or more`)]
  }
  const isRampOfAmount =
    change.time.shape === 'ramp' && (change.quantity === 'water' || change.quantity === 'nuclei')
  return change.factor === 0 && (change.quantity === 'temperature' || isRampOfAmount)
    ? [problem([...path, 'factor'], '0 is not allowed; allowed: above 0')]
    : []
}

function checkBand(path: Path, band: Perturbation['altitude']): ScenarioProblem[] {
  if (band === undefined) return []
  const { from_km, to_km, centre_km, width_km } = band
  const sharp = from_km !== undefined && to_km !== undefined
  const gaussian = centre_km !== undefined && width_km !== undefined
  const given = [from_km, to_km, centre_km, width_km].filter((value) => value !== undefined)
  if (given.length !== 2 || sharp === gaussian) {
    return [problem(path, 'needs from_km and to_km, or centre_km and width_km')]
  }
  return sharp && to_km <= from_km
    ? [problem([...path, 'to_km'], `${to_km} is not allowed; allowed: above from_km ${from_km}`)]
    : []
}

const neededTimes = {
  always: [],
  step: ['start_h'],
  pulse: ['start_h', 'end_h'],
  ramp: ['start_h', 'rise_h'],
} as const

function checkCourse(path: Path, time: Perturbation['time']): ScenarioProblem[] {
  const needed: readonly string[] = neededTimes[time.shape]
  const usable = time.shape === 'ramp' ? [...needed, 'end_h'] : needed
  for (const key of ['start_h', 'end_h', 'rise_h'] as const) {
    if (needed.includes(key) && time[key] === undefined) {
      return [problem([...path, key], `is missing; a ${time.shape} needs it`)]
    }
    if (!usable.includes(key) && time[key] !== undefined) {
      const others = usable.length === 0 ? 'none' : usable.join(', ')
      return [problem([...path, key], `has no meaning for ${time.shape}; allowed: ${others}`)]
    }
  }
  const { start_h = 0, end_h, rise_h = 0 } = time
  return time.shape === 'always' ? [] : checkWindow(path, { start_h, end_h, rise_h })
}
