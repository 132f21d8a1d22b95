import type { AirBasis, Interval } from '../atmosphere/atmosphere.ts'
import type { Column } from '../state/column.ts'
import {
  type AirCoefficients,
  makeAirCoefficients,
  readAirCoefficients,
} from './airCoefficients.ts'
import type { KelvinTable } from './kernel/kelvinTable.ts'

/**
 * How many instants are kept. A step of the solver from t over h in two columns visits t + h/2, h, then h/4, h/2,
 * 3h/4, h, and the next one starts at t + h: four instants serve all seven evaluations.
 */
const KEPT = 4

/** The coefficients of the air at the instants that the solver comes back to; of steady air once per interval. */
export interface RecentAir {
  enter(basis: AirBasis, interval: Interval): void
  at(time_s: number): AirCoefficients
}

export function makeRecentAir(column: Column, kelvin: KelvinTable): RecentAir {
  const { atmosphere } = column
  const kept = Array.from({ length: atmosphere.steady ? 1 : KEPT }, () => ({
    time_s: Number.NaN,
    air: makeAirCoefficients(column),
  }))
  let basis: AirBasis
  let interval: Interval
  let oldest = 0
  return {
    enter(nextBasis, nextInterval) {
      basis = nextBasis
      interval = nextInterval
      for (const entry of kept) entry.time_s = Number.NaN
    },
    at(time_s) {
      const instant = atmosphere.steady ? interval.from_s : time_s
      for (const entry of kept) if (entry.time_s === instant) return entry.air
      const entry = kept[oldest]
      oldest = (oldest + 1) % kept.length
      const air = atmosphere.read(basis, instant, interval)
      readAirCoefficients(entry.air, column, kelvin, { basis, air })
      entry.time_s = instant
      return entry.air
    },
  }
}
