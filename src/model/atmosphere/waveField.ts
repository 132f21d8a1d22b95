import { AIR_MOLECULE_MASS, BOLTZMANN } from '../constants.ts'
import type { AltitudeGrid } from '../grid.ts'
import type { Wave } from '../scenario/types.ts'
import type { RestingAir } from './restingAir.ts'

/**
 * Waves displace the column; they do not advect it. For each wave
 *   T'(z,t) = A(z) e(t) cos(2 pi t/period + 2 pi (z - z_ref)/wavelength - phase),  A ~ exp(z/2H) with the local H,
 *   zeta(z,t) = -s T'/(dT0/dz + g/cp)      displacement, s the share of T' that is adiabatic displacement.
 * Linear, hydrostatic gravity-wave theory (textbook relations, from memory).
 *
 * The amplitudes are held: with a = A |m|/(dT0/dz + g/cp), the sum over waves stays below the convective limit a = 1
 * and the displaced part below LARGEST_STRETCHING, so that layers of air never fold. The sum of many waves of random
 * phase is taken as three standard deviations, never more than the plain sum.
 */
export interface WaveField {
  /** Adds the waves at a time to T' (K) and displacement (m) on the half points. */
  add(time_s: number, temperature_K: Float64Array, displacement_m: Float64Array): void
  /** Share of the requested amplitude that is left after holding, on the half points. */
  heldShare: Float64Array
}

/** Largest |d zeta/dz|: 1 + Z stays above 0.3. */
export const LARGEST_STRETCHING = 0.7

/** Stability below which air counts as neutral and carries no wave, K/m. */
const NEUTRAL_STABILITY = 1e-6

interface PreparedWave {
  wave: Wave
  cosine: Float64Array
  sine: Float64Array
  displacementFactor: Float64Array
}

export function waveField(waves: readonly Wave[], air: RestingAir, grid: AltitudeGrid): WaveField {
  const stability = air.stability_K_per_m.map((value) => Math.max(value, NEUTRAL_STABILITY))
  const amplitudes = waves.map((wave) => amplitudeProfile(wave, air, grid))
  const heldShare = heldShareOf(waves, amplitudes, stability)
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
    add(time_s, temperature_K, displacement_m) {
      for (const wave of prepared) addWave(wave, time_s, temperature_K, displacement_m)
    },
  }
}

function addWave(
  { wave, cosine, sine, displacementFactor }: PreparedWave,
  time_s: number,
  temperature_K: Float64Array,
  displacement_m: Float64Array,
): void {
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

/** A(z) = A exp(integral dz/2H) from the reference altitude, H = k T0/(m g); trapezoidal sums on the half points. */
function amplitudeProfile(wave: Wave, air: RestingAir, grid: AltitudeGrid): Float64Array {
  const z = grid.halfPoints_m
  if (!wave.grows) return z.map(() => wave.amplitude_K)
  const inverseTwiceHeight = z.map(
    (_, i) =>
      (AIR_MOLECULE_MASS * air.gravity_m_per_s2[i]) / (2 * BOLTZMANN * air.temperature_K[i]),
  )
  const exponent = new Float64Array(z.length)
  for (let i = 1; i < z.length; i++) {
    const mean = (inverseTwiceHeight[i - 1] + inverseTwiceHeight[i]) / 2
    exponent[i] = exponent[i - 1] + mean * (z[i] - z[i - 1])
  }
  const spacing = z[1] - z[0]
  const place = Math.min(
    Math.max((wave.referenceAltitude_m - z[0]) / spacing, 0),
    z.length - 1 - 1e-9,
  )
  const below = Math.floor(place)
  const atReference = exponent[below] + (place - below) * (exponent[below + 1] - exponent[below])
  return exponent.map((value) => wave.amplitude_K * Math.exp(value - atReference))
}

function heldShareOf(
  waves: readonly Wave[],
  amplitudes: readonly Float64Array[],
  stability: Float64Array,
): Float64Array {
  return stability.map((value, i) => {
    const steepness = waves.map(
      (wave, w) => ((2 * Math.PI) / wave.verticalWavelength_m) * (amplitudes[w][i] / value),
    )
    const displaced = steepness.map((a, w) => a * waves[w].displacementShare)
    return 1 / Math.max(1, likelyPeak(steepness), likelyPeak(displaced) / LARGEST_STRETCHING)
  })
}

/** The plain sum, or three standard deviations of a sum with random phases where that is less. */
function likelyPeak(amplitudes: readonly number[]): number {
  const sum = amplitudes.reduce((total, a) => total + Math.abs(a), 0)
  const variance = amplitudes.reduce((total, a) => total + (a * a) / 2, 0)
  return Math.min(sum, 3 * Math.sqrt(variance))
}
