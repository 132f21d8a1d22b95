import type { AltitudeGrid } from '../grid.ts'
import { readHermite } from '../numerics/hermite.ts'
import type { Wave } from '../scenario/types.ts'
import type { RestingAir } from './restingAir.ts'

/**
 * Waves displace the column; they do not advect it. For each wave
 *   T'(z,t) = A(z) e(t) cos(2 pi t/period + 2 pi (z - z_ref)/wavelength - phase),  A ~ exp(z/2H) with the local H,
 *   zeta(z,t) = -s T'/(dT0/dz + g/cp)      displacement, s the share of T' that is adiabatic displacement.
 * Linear, hydrostatic gravity-wave theory (textbook relations, from memory).
 *
 * The amplitudes are held: with b = A/(dT0/dz + g/cp), the sum over waves of |m| b stays below the convective limit 1
 * and the sum of s sqrt((m b)^2 + (db/dz)^2), the largest |d zeta/dz|, below LARGEST_STRETCHING, so that layers of air
 * never fold. The members of a random field, whose phases differ, count together as three standard deviations, never
 * more than their plain sum.
 */
export interface WaveField {
  /** Adds the waves at a time inside an interval to T' (K) and displacement (m) on the half points. */
  add(moment: WaveMoment, temperature_K: Float64Array, displacement_m: Float64Array): void
  /** Share of the requested amplitude that is left after holding, on the half points. */
  heldShare: Float64Array
}

/** A wave without a smooth edge is on or off for a whole interval, judged at its middle. */
export interface WaveMoment {
  time_s: number
  middle_s: number
}

/** Largest |d zeta/dz|: 1 + Z stays above 0.3. */
export const LARGEST_STRETCHING = 0.7

/** Stability below which air counts as neutral and carries no wave, K/m. */
const NEUTRAL_STABILITY = 1e-6

/** Rounds of holding: a held amplitude has a gradient of its own. */
const HOLDING_ROUNDS = 5

interface PreparedWave {
  wave: Wave
  cosine: Float64Array
  sine: Float64Array
  displacementFactor: Float64Array
}

export function waveField(waves: readonly Wave[], air: RestingAir, grid: AltitudeGrid): WaveField {
  const stability = air.stability_K_per_m.map((value) => Math.max(value, NEUTRAL_STABILITY))
  const amplitudes = waves.map((wave) => amplitudeProfile(wave, air))
  const heldShare = heldShareOf(waves, amplitudes, stability, grid.spacing_m / 2)
  const prepared = waves.map((wave, w): PreparedWave => {
    const held = amplitudes[w].map((amplitude, i) => amplitude * heldShare[i])
    const phase = grid.halfPoints_m.map(
      (z) =>
        (2 * Math.PI * (z - wave.referenceAltitude_m)) / wave.verticalWavelength_m - wave.phase_rad,
    )
    return {
      wave,
      cosine: held.map((amplitude, i) => amplitude * Math.cos(phase[i])),
      sine: held.map((amplitude, i) => amplitude * Math.sin(phase[i])),
      displacementFactor: stability.map((value) => -wave.displacementShare / value),
    }
  })
  return {
    heldShare,
    add(moment, temperature_K, displacement_m) {
      for (const wave of prepared) addWave(wave, moment, temperature_K, displacement_m)
    },
  }
}

function addWave(
  { wave, cosine, sine, displacementFactor }: PreparedWave,
  { time_s, middle_s }: WaveMoment,
  temperature_K: Float64Array,
  displacement_m: Float64Array,
): void {
  if (middle_s < wave.start_s || middle_s > wave.end_s) return
  const strength = waveEnvelope(wave, time_s)
  if (strength === 0) return
  const angle = (2 * Math.PI * time_s) / wave.period_s
  const [c, s] = [strength * Math.cos(angle), strength * Math.sin(angle)]
  for (let i = 0; i < temperature_K.length; i++) {
    const anomaly = c * cosine[i] - s * sine[i]
    temperature_K[i] += anomaly
    displacement_m[i] += displacementFactor[i] * anomaly
  }
}

/** Smooth start and end: half a cosine over the rise time; 1 in between, 0 outside. */
export function waveEnvelope({ start_s, end_s, rise_s }: Wave, time_s: number): number {
  if (time_s < start_s || time_s > end_s) return 0
  const fromEdge = Math.min(time_s - start_s, end_s - time_s)
  return fromEdge >= rise_s ? 1 : 0.5 - 0.5 * Math.cos((Math.PI * fromEdge) / rise_s)
}

/** A(z) = A exp(integral dz/2H) from the reference altitude; in hydrostatic air that is A sqrt(p_ref/p). */
function amplitudeProfile(wave: Wave, air: RestingAir): Float64Array {
  if (!wave.grows) return air.pressure_Pa.map(() => wave.amplitude_K)
  const reference = readHermite(air.logPressure, wave.referenceAltitude_m)
  return air.pressure_Pa.map(
    (pressure) => wave.amplitude_K * Math.exp((reference - Math.log(pressure)) / 2),
  )
}

function heldShareOf(
  waves: readonly Wave[],
  amplitudes: readonly Float64Array[],
  stability: Float64Array,
  spacing_m: number,
): Float64Array {
  const share = stability.map(() => 1)
  for (let round = 0; round < HOLDING_ROUNDS; round++) {
    const excess = excessSteepness(waves, amplitudes, stability, { share, spacing_m })
    for (let i = 0; i < share.length; i++) share[i] /= excess[i]
  }
  const left = Math.max(1, ...excessSteepness(waves, amplitudes, stability, { share, spacing_m }))
  return share.map((value) => value / left)
}

/** How far the waves exceed what they are held to, at least 1, on the half points. */
function excessSteepness(
  waves: readonly Wave[],
  amplitudes: readonly Float64Array[],
  stability: Float64Array,
  { share, spacing_m }: { share: Float64Array; spacing_m: number },
): Float64Array {
  const heights = amplitudes.map((amplitude) =>
    amplitude.map((value, i) => (share[i] * value) / stability[i]),
  )
  return stability.map((_, i) => {
    const steepness = waves.map(
      (wave, w) => ((2 * Math.PI) / wave.verticalWavelength_m) * heights[w][i],
    )
    const stretching = waves.map(
      (wave, w) =>
        wave.displacementShare * Math.hypot(steepness[w], slopeAt(heights[w], i, spacing_m)),
    )
    return Math.max(
      1,
      likelyPeak(waves, steepness),
      likelyPeak(waves, stretching) / LARGEST_STRETCHING,
    )
  })
}

function slopeAt(values: Float64Array, i: number, spacing_m: number): number {
  const [below, above] = [Math.max(i - 1, 0), Math.min(i + 1, values.length - 1)]
  return (values[above] - values[below]) / ((above - below) * spacing_m)
}

/** Plain sum for named waves; for the members of a random field three standard deviations where that is less. */
function likelyPeak(waves: readonly Wave[], amplitudes: readonly number[]): number {
  let named = 0
  let random = 0
  let variance = 0
  waves.forEach(({ isRandomMember }, w) => {
    const amplitude = Math.abs(amplitudes[w])
    if (!isRandomMember) named += amplitude
    else {
      random += amplitude
      variance += (amplitude * amplitude) / 2
    }
  })
  return named + Math.min(random, 3 * Math.sqrt(variance))
}
