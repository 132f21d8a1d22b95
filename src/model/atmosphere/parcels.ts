import type { AltitudeGrid } from '../grid.ts'
import { readHermite } from '../numerics/hermite.ts'
import type { AirState } from './airState.ts'
import type { AirBasis } from './atmosphere.ts'
import type { MeasuredTemperature } from './measuredTemperature.ts'
import type { ProfileSeries } from './profileSeries.ts'
import { LARGEST_STRETCHING, type WaveMoment } from './waveField.ts'

/**
 * Temperature and pressure of the displaced air:
 *   T = T0(z0) + (dT0/dz) zeta s + T',  p = p0(z0 + s zeta),  n/n0 = p/(k T n0).
 * A measured T(z, t) is a T' at fixed altitude that replaces T0.
 */
export function readParcels(
  state: AirState,
  { rest, waves }: AirBasis,
  sources: { temperature: ProfileSeries; measured: MeasuredTemperature | null },
  moment: WaveMoment,
  grid: AltitudeGrid,
): void {
  const { temperature_K, displacement_m, pressure_Pa, densityRatio, stretching } = state
  sources.temperature.read(moment.time_s, temperature_K)
  sources.measured?.replace(moment, temperature_K)
  displacement_m.fill(0)
  waves.add(moment, temperature_K, displacement_m)
  for (let i = 0; i < temperature_K.length; i++) {
    const shift = displacement_m[i]
    pressure_Pa[i] = rest.pressure_Pa[i]
    if (shift !== 0) {
      temperature_K[i] += rest.lapse_K_per_m[i] * shift
      pressure_Pa[i] = Math.exp(readHermite(rest.logPressure, grid.halfPoints_m[i] + shift))
    }
    densityRatio[i] =
      (pressure_Pa[i] / rest.pressure_Pa[i]) * (rest.temperature_K[i] / temperature_K[i])
  }
  readStretching(stretching, displacement_m, grid.spacing_m)
}

/**
 * Central differences over one cell, one-sided at the ends. The waves are held so that this stays above
 * -LARGEST_STRETCHING; only the rare coincidences of a random field need the last limit.
 */
function readStretching(stretching: Float64Array, displacement_m: Float64Array, dz: number): void {
  const last = stretching.length - 1
  for (let i = 0; i <= last; i++) {
    const [below, above] = [Math.max(i - 1, 0), Math.min(i + 1, last)]
    const change = (displacement_m[above] - displacement_m[below]) / ((above - below) * (dz / 2))
    stretching[i] = Math.max(change, -LARGEST_STRETCHING)
  }
}
