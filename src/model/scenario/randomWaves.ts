import { randomStream } from '../numerics/random.ts'
import type { ScenarioDocument } from './schema.ts'

type RandomWaves = NonNullable<ScenarioDocument['random_waves']>
type WaveDocument = ScenarioDocument['waves'][number]

/**
 * A random superposition spelt out wave by wave.
 *
 *   ln(wavelength): one draw in each of `count` equal parts of its range, so that the spectrum is covered evenly
 *   ln(period), phase: evenly random
 *   a_i^2 ~ m_i^(1 - p), so that the variance per vertical wavenumber m falls as m^-p (dm = m dln m)
 *   sum of a_i^2 / 2 = rms^2
 *
 * The form of the spectrum is common practice (no source); its meaning is this program's own choice.
 */
export function randomWaves(field: RandomWaves): WaveDocument[] {
  const { seed, count, rms_K, periods_h, vertical_wavelengths_km, spectral_slope, ...shared } =
    field
  const stream = randomStream(seed)
  const members = Array.from({ length: count }, (_, i) => ({
    ...shared,
    vertical_wavelength_km: between(vertical_wavelengths_km, (i + stream.uniform()) / count),
    period_h: between(periods_h, stream.uniform()),
    phase_deg: 360 * stream.uniform(),
  }))
  // Wavelengths relative to the longest, so that no slope can overflow.
  const longest = vertical_wavelengths_km[1]
  const weights = members.map(
    ({ vertical_wavelength_km }) =>
      (longest / vertical_wavelength_km) ** ((1 - spectral_slope) / 2),
  )
  const norm = Math.sqrt(weights.reduce((sum, weight) => sum + (weight * weight) / 2, 0))
  return members.map((member, i) => ({ ...member, amplitude_K: (rms_K * weights[i]) / norm }))
}

/** The value at a share of the way from the lesser to the greater in the logarithm. */
function between([least, greatest]: readonly number[], share: number): number {
  return least * (greatest / least) ** share
}
