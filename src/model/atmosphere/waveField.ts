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

/** Height over which holding is made smooth, m. */
const HOLDING_REACH = 1000

interface PreparedWave {
  wave: Wave
  cosine: Float64Array
  sine: Float64Array
  displacementFactor: Float64Array
}

export function waveField(waves: readonly Wave[], air: RestingAir, grid: AltitudeGrid): WaveField {
  const stability = air.stability_K_per_m.map((value) => Math.max(value, NEUTRAL_STABILITY))
  const amplitudes = waves.map((wave) => amplitudeProfile(wave, air))
  const heldShare =
    waves.length === 0
      ? stability.map(() => 1)
      : heldShareOf(waves, amplitudes, stability, grid.spacing_m / 2)
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

/**
 * The share that holds the waves at every height. That of the stretching is made smooth, so that it adds little slope
 * of its own: the least value within HOLDING_REACH, averaged over as much, which never exceeds the share at the height
 * itself. What slope is added all the same is taken off everywhere.
 */
function heldShareOf(
  waves: readonly Wave[],
  amplitudes: readonly Float64Array[],
  stability: Float64Array,
  spacing_m: number,
): Float64Array {
  const heights = amplitudes.map((amplitude) => amplitude.map((value, i) => value / stability[i]))
  const reach = Math.ceil(HOLDING_REACH / spacing_m)
  const least = overWindow(
    stretchingExcess(waves, heights, spacing_m),
    reach,
    (window) => 1 / Math.max(...window),
  )
  const smooth = overWindow(
    least,
    reach,
    (window) => window.reduce((sum, value) => sum + value, 0) / window.length,
  )
  const convective = convectiveExcess(waves, heights)
  const share = smooth.map((value, i) => Math.min(value, 1 / convective[i]))
  const held = heights.map((height) => height.map((value, i) => value * share[i]))
  const left = Math.max(...stretchingExcess(waves, held, spacing_m))
  return share.map((value) => value / left)
}

function overWindow(
  values: Float64Array,
  reach: number,
  combine: (window: Float64Array) => number,
): Float64Array {
  return values.map((_, i) => combine(values.subarray(Math.max(0, i - reach), i + reach + 1)))
}

const wavenumber = ({ verticalWavelength_m }: Wave) => (2 * Math.PI) / verticalWavelength_m

/** How far the sum of |m| b exceeds the convective limit, at least 1, on the half points. */
function convectiveExcess(waves: readonly Wave[], heights: readonly Float64Array[]): Float64Array {
  return heights[0].map((_, i) =>
    Math.max(
      1,
      likelyPeak(waves, (wave, w) => wavenumber(wave) * heights[w][i]),
    ),
  )
}

/** How far the largest |d zeta/dz| exceeds LARGEST_STRETCHING, at least 1, on the half points. */
function stretchingExcess(
  waves: readonly Wave[],
  heights: readonly Float64Array[],
  spacing_m: number,
): Float64Array {
  const steepness = (wave: Wave, w: number, i: number) =>
    wave.displacementShare *
    Math.hypot(wavenumber(wave) * heights[w][i], slopeAt(heights[w], i, spacing_m))
  return heights[0].map((_, i) =>
    Math.max(1, likelyPeak(waves, (wave, w) => steepness(wave, w, i)) / LARGEST_STRETCHING),
  )
}

function slopeAt(values: Float64Array, i: number, spacing_m: number): number {
  const [below, above] = [Math.max(i - 1, 0), Math.min(i + 1, values.length - 1)]
  return (values[above] - values[below]) / ((above - below) * spacing_m)
}

/** Plain sum for named waves; for the members of a random field three standard deviations where that is less. */
function likelyPeak(
  waves: readonly Wave[],
  amplitudeOf: (wave: Wave, index: number) => number,
): number {
  let named = 0
  let random = 0
  let variance = 0
  waves.forEach((wave, w) => {
    const amplitude = Math.abs(amplitudeOf(wave, w))
    if (!wave.isRandomMember) named += amplitude
    else {
      random += amplitude
      variance += (amplitude * amplitude) / 2
    }
  })
  return named + Math.min(random, 3 * Math.sqrt(variance))
}
