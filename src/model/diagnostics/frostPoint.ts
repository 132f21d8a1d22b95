import { GAS_CONSTANT } from '../constants.ts'
import { type SaturationFormula, saturationPressure } from '../processes/saturationPressure.ts'

/** Range in which frost points are told, K. */
const [COLDEST, WARMEST] = [60, 300]

/** Latent heat of sublimation for the slope of the search, J/mol; the result does not depend on it. */
const ROUND_LATENT_HEAT = 5.1e4

const [ENOUGH_K, MOST_STEPS] = [1e-9, 50]

/**
 * Temperature at which a vapour pressure saturates flat ice, K, to 1e-9 K: Newton's search on ln p with the slope
 * L/(R T^2) of Clausius and Clapeyron; NaN without vapour or where it lies outside 60 to 300 K.
 */
export function frostPoint(formula: SaturationFormula, vapourPressure_Pa: number): number {
  if (!(vapourPressure_Pa > 0)) return Number.NaN
  let temperature_K = 150
  for (let step = 0; step < MOST_STEPS; step++) {
    const excess = Math.log(saturationPressure(formula, temperature_K) / vapourPressure_Pa)
    const change = (-excess * GAS_CONSTANT * temperature_K * temperature_K) / ROUND_LATENT_HEAT
    temperature_K = Math.min(Math.max(temperature_K + change, COLDEST / 2), 2 * WARMEST)
    if (Math.abs(change) < ENOUGH_K) break
  }
  return temperature_K >= COLDEST && temperature_K <= WARMEST ? temperature_K : Number.NaN
}
