import { InputError } from '../errors.ts'
import type { AltitudeGrid } from '../grid.ts'
import type { AirState } from './airState.ts'
import type { Atmosphere, Interval } from './atmosphere.ts'

/** The smallest value of a quantity of the air, and where and when it is met. */
interface Least {
  value: number
  time_s: number
  altitude_m: number
}

export interface AirSurvey {
  /** Smallest thickness of a displaced layer over that at rest, before the last limit. */
  smallestStretching: number
}

/** Looks at this many evenly spaced times, and at both sides of every break point. */
const SAMPLES = 200

/** What must not fall to zero or below it, in the words of a message. */
const BOUNDED = [
  { key: 'temperature_K', name: 'temperature', unit: 'K', scale: 1, allowed: 'above 0' },
  {
    key: 'mixing_m2_per_s',
    name: 'eddy diffusivity',
    unit: 'm2/s',
    scale: 1,
    allowed: '0 or more',
  },
  { key: 'water', name: 'background water', unit: 'ppmv', scale: 1e6, allowed: '0 or more' },
  {
    key: 'nuclei',
    name: 'background of nuclei',
    unit: 'per air molecule',
    scale: 1,
    allowed: '0 or more',
  },
] as const

/**
 * Looks through the prescribed air of a whole run before it starts.
 *
 * @throws InputError where waves and perturbations together leave an impossible temperature, diffusivity or background
 */
export function surveyAir(
  atmosphere: Atmosphere,
  grid: AltitudeGrid,
  duration_s: number,
): AirSurvey {
  const basis = atmosphere.basis(0)
  let smallestStretching = 1
  for (const { time_s, interval } of moments(atmosphere, duration_s)) {
    const air = atmosphere.read(basis, time_s, interval)
    for (const bound of BOUNDED) {
      const least = leastOf(air[bound.key], grid, time_s)
      const isBad = bound.key === 'temperature_K' ? !(least.value > 0) : !(least.value >= 0)
      if (isBad) throw refusal(bound, least)
    }
    smallestStretching = Math.min(smallestStretching, 1 + leastStretching(air, grid))
  }
  return { smallestStretching }
}

function moments(
  atmosphere: Atmosphere,
  duration_s: number,
): { time_s: number; interval: Interval }[] {
  const even = Array.from({ length: SAMPLES + 1 }, (_, i) => (duration_s * i) / SAMPLES)
  const times = [...new Set([...even, ...atmosphere.breakPoints_s])].sort((a, b) => a - b)
  return times.slice(1).flatMap((to_s, i) => {
    const interval = { from_s: times[i], to_s }
    return [times[i], to_s].map((time_s) => ({ time_s, interval }))
  })
}

function leastOf(values: Float64Array, { halfPoints_m }: AltitudeGrid, time_s: number): Least {
  let at = 0
  for (let i = 1; i < values.length; i++) if (!(values[i] >= values[at])) at = i
  return { value: values[at], time_s, altitude_m: halfPoints_m[at] }
}

function refusal(
  bound: (typeof BOUNDED)[number],
  { value, time_s, altitude_m }: Least,
): InputError {
  const place = `at ${(time_s / 3600).toFixed(2)} h and ${(altitude_m / 1000).toFixed(1)} km`
  const amount = `${Number((value * bound.scale).toPrecision(4))} ${bound.unit}`
  return new InputError(
    `waves and perturbations make the ${bound.name} ${amount} ${place}; allowed: ${bound.allowed}`,
  )
}

function leastStretching({ displacement_m }: AirState, { spacing_m }: AltitudeGrid): number {
  let least = 0
  for (let i = 1; i < displacement_m.length - 1; i++) {
    least = Math.min(least, (displacement_m[i + 1] - displacement_m[i - 1]) / spacing_m)
  }
  return least
}
