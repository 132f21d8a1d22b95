import type { Profile } from '../scenario/types.ts'
import { profileSeries } from './profileSeries.ts'
import type { WaveMoment } from './waveField.ts'

/** A measured T(z, t), which replaces the background temperature where it was measured. */
export interface MeasuredTemperature {
  steady: boolean
  /** Replaces T0 by the measurement, in place, K. */
  replace(moment: WaveMoment, temperature_K: Float64Array): void
}

/** Beyond the altitudes of the table its departure from the background fades to nothing over this height, m. */
const FADE = 1000

/**
 * The measurement acts between its first and last time and altitude; outside, the background holds. A table with a
 * single time holds for the whole run.
 */
export function measuredTemperature(
  table: Profile,
  altitudes_m: Float64Array,
): MeasuredTemperature {
  const series = profileSeries(table, altitudes_m, 'constant')
  const [lowest, highest] = [table.altitudes_m[0], table.altitudes_m[table.altitudes_m.length - 1]]
  const [first, last] = [table.times_s[0], table.times_s[table.times_s.length - 1]]
  const measured = new Float64Array(altitudes_m.length)
  const weights = altitudes_m.map((z) =>
    Math.max(0, 1 - Math.max(lowest - z, z - highest, 0) / FADE),
  )
  return {
    steady: series.steady,
    replace({ time_s, middle_s }, temperature_K) {
      if (!series.steady && (middle_s < first || middle_s > last)) return
      series.read(time_s, measured)
      for (let i = 0; i < temperature_K.length; i++) {
        if (weights[i] === 1) temperature_K[i] = measured[i]
        else temperature_K[i] += weights[i] * (measured[i] - temperature_K[i])
      }
    },
  }
}
