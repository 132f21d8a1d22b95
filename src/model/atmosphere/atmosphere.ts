import type { AltitudeGrid } from '../grid.ts'
import type { Perturbation, PerturbedQuantity, Scenario } from '../scenario/types.ts'
import { type AirState, makeAirState } from './airState.ts'
import { readInjectionRates } from './injection.ts'
import { type MeasuredTemperature, measuredTemperature } from './measuredTemperature.ts'
import { readParcels } from './parcels.ts'
import { altitudeWeight, isNeutral, perturbed, timeEdges, timeStrength } from './perturbation.ts'
import { type ProfileSeries, profileCurve, profileSeries } from './profileSeries.ts'
import { type RestingAir, restingAir } from './restingAir.ts'
import { type WaveField, waveField } from './waveField.ts'

/** Air in balance at one time of the run, and the waves that it carries. */
export interface AirBasis {
  time_s: number
  rest: RestingAir
  waves: WaveField
}

/** A span of time without break points inside: steps and pulses do not change in it. */
export interface Interval {
  from_s: number
  to_s: number
}

/** Instants closer than this are one: they differ by the rounding of hours to seconds alone, s. */
export const SAME_TIME = 1e-6

/** Instants in order, of those that are one the earliest. */
export function distinctTimes(times_s: readonly number[]): number[] {
  const sorted = [...times_s].sort((a, b) => a - b)
  return sorted.filter((time, i) => i === 0 || time - sorted[i - 1] > SAME_TIME)
}

/**
 * The prescribed air. Density n0 and pressure p0 belong to a basis and stay fixed in time until the next one;
 * waves displace the air; perturbations act at fixed n0 and p0.
 */
export interface Atmosphere {
  /** Nothing changes inside an interval: no waves, no ramps, no profile that depends on time. */
  steady: boolean
  /** Instants with a jump or kink in the prescribed air, sorted, inside the run. */
  breakPoints_s: number[]
  /** Instants at which the density is brought back to balance with a background that changes with time. */
  rebaseTimes_s: number[]
  /** The latest is kept: asking for the same time again costs nothing. */
  basis(time_s: number): AirBasis
  /** The air at a time inside an interval. The record is reused by the next call. */
  read(basis: AirBasis, time_s: number, interval: Interval): AirState
}

export function makeAtmosphere(scenario: Scenario, grid: AltitudeGrid): Atmosphere {
  const { background, waves, perturbations } = scenario
  const sources = sampleSources(scenario, grid)
  const weights = perturbations.map((change) =>
    grid.halfPoints_m.map((z) => altitudeWeight(change.altitude, z)),
  )
  const state = makeAirState(grid.halfPoints_m.length)
  const reference = {
    altitude_m: background.referenceAltitude_m,
    pressure_Pa: background.referencePressure_Pa,
  }
  const restAt = (time_s: number) =>
    restingAir(profileCurve(background.temperature_K, time_s), reference, grid)
  const basisAt = (time_s: number): AirBasis => {
    const rest = restAt(time_s)
    return { time_s, rest, waves: waveField(waves, rest, grid) }
  }
  let latest = basisAt(0)
  // Nuclei are given as a number density; the mixing ratio that it makes at the start is theirs for the whole run.
  const startDensity_per_m3 = latest.rest.density_per_m3
  return {
    steady:
      waves.length === 0 &&
      Object.values(sources).every((series) => series === null || series.steady) &&
      perturbations.every((change) => change.time.shape !== 'ramp'),
    breakPoints_s: breakPoints(scenario),
    rebaseTimes_s: rebaseTimes(scenario),
    basis(time_s) {
      if (latest.time_s !== time_s) latest = basisAt(time_s)
      return latest
    },
    read(basis, time_s, interval) {
      const changes = activeChanges(perturbations, weights, time_s, interval)
      const moment = { time_s, middle_s: (interval.from_s + interval.to_s) / 2 }
      readParcels(state, basis, sources, moment, grid)
      apply(changes, 'temperature', state.temperature_K)
      sources.wind.read(time_s, state.wind_m_per_s)
      apply(changes, 'wind', state.wind_m_per_s)
      sources.mixing.read(time_s, state.mixing_m2_per_s)
      apply(changes, 'mixing', state.mixing_m2_per_s)
      readComposition(state, sources, startDensity_per_m3, time_s)
      apply(changes, 'water', state.water)
      applyToNuclei(changes, state.nuclei, startDensity_per_m3)
      readInjectionRates(state.injection, perturbations, weights, {
        time_s: moment.middle_s,
        rest: basis.rest,
      })
      return state
    },
  }
}

interface Sources {
  temperature: ProfileSeries
  measured: MeasuredTemperature | null
  wind: ProfileSeries
  mixing: ProfileSeries
  water: ProfileSeries
  nuclei: ProfileSeries
  photolysisLifetime: ProfileSeries | null
}

function sampleSources({ background }: Scenario, grid: AltitudeGrid): Sources {
  const z = grid.halfPoints_m
  const { temperatureTable_K: measured, photolysisLifetime_s: lifetime } = background
  return {
    temperature: profileSeries(background.temperature_K, z, 'line'),
    measured: measured && measuredTemperature(measured, z),
    wind: profileSeries(background.wind_m_per_s, z, 'constant'),
    mixing: profileSeries(background.mixing_m2_per_s, z, 'constant'),
    water: profileSeries(background.water, z, 'constant'),
    nuclei: profileSeries(background.nuclei_per_m3, z, 'constant'),
    photolysisLifetime: lifetime && profileSeries(lifetime, z, 'constant'),
  }
}

function readComposition(
  state: AirState,
  sources: Sources,
  startDensity_per_m3: Float64Array,
  time_s: number,
): void {
  sources.water.read(time_s, state.water)
  sources.nuclei.read(time_s, state.nuclei)
  for (let i = 0; i < state.nuclei.length; i++) state.nuclei[i] /= startDensity_per_m3[i]
  if (sources.photolysisLifetime === null) return
  sources.photolysisLifetime.read(time_s, state.photolysis_per_s)
  for (let i = 0; i < state.photolysis_per_s.length; i++) {
    state.photolysis_per_s[i] = 1 / state.photolysis_per_s[i]
  }
}

interface ActiveChange {
  change: Perturbation
  strength: number
  weights: Float64Array
}

/** Steps and pulses are judged at the middle of the interval, so that its edges belong to one side. */
function activeChanges(
  perturbations: readonly Perturbation[],
  weights: readonly Float64Array[],
  time_s: number,
  { from_s, to_s }: Interval,
): ActiveChange[] {
  return perturbations
    .map((change, i) => ({
      change,
      strength: timeStrength(
        change.time,
        change.time.shape === 'ramp' ? time_s : (from_s + to_s) / 2,
      ),
      weights: weights[i],
    }))
    .filter(({ change, strength }) => strength > 0 && !isNeutral(change))
}

function apply(
  changes: readonly ActiveChange[],
  quantity: PerturbedQuantity,
  values: Float64Array,
): void {
  for (const { change, strength, weights } of changes) {
    if (change.quantity !== quantity) continue
    for (let i = 0; i < values.length; i++) {
      values[i] = perturbed(change, values[i], strength * weights[i])
    }
  }
}

/** Nuclei are changed by a number density, the background is a mixing ratio. */
function applyToNuclei(
  changes: readonly ActiveChange[],
  nuclei: Float64Array,
  density_per_m3: Float64Array,
): void {
  for (const { change, strength, weights } of changes) {
    if (change.quantity !== 'nuclei') continue
    for (let i = 0; i < nuclei.length; i++) {
      const density = density_per_m3[i]
      nuclei[i] = perturbed(change, nuclei[i] * density, strength * weights[i]) / density
    }
  }
}

function breakPoints(scenario: Scenario): number[] {
  const { background, waves, perturbations, duration_s } = scenario
  const profiles = [
    background.temperature_K,
    background.water,
    background.wind_m_per_s,
    background.mixing_m2_per_s,
    background.nuclei_per_m3,
    background.photolysisLifetime_s,
    background.temperatureTable_K,
  ]
  const times = [
    ...profiles.flatMap((profile) =>
      profile && profile.times_s.length > 1 ? profile.times_s : [],
    ),
    ...waves.flatMap(({ start_s, end_s, rise_s }) => [
      start_s,
      start_s + rise_s,
      end_s - rise_s,
      end_s,
    ]),
    ...perturbations.flatMap(({ time }) => timeEdges(time)),
    ...rebaseTimes(scenario),
    ...scenario.numerics.breakPoints_s,
  ]
  return distinctTimes(times.filter((time) => time > 0 && time < duration_s))
}

function rebaseTimes({ background, duration_s }: Scenario): number[] {
  if (background.temperature_K.times_s.length < 2) return []
  const count = Math.ceil(duration_s / background.rebaseInterval_s) - 1
  return Array.from({ length: count }, (_, i) => (i + 1) * background.rebaseInterval_s)
}
