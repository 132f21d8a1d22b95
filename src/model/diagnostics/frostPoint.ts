import { type SaturationFormula, saturationPressure } from '../processes/saturationPressure.ts'

/** Range in which frost points are sought, K. */
const [COLDEST, WARMEST] = [60, 300]

/**
 * Temperature at which a vapour pressure saturates flat ice, K, by bisection to 1e-9 K; NaN without vapour or where it
 * lies outside 60 to 300 K.
 */
export function frostPoint(formula: SaturationFormula, vapourPressure_Pa: number): number {
  const excess = (temperature_K: number) =>
    saturationPressure(formula, temperature_K) - vapourPressure_Pa
  if (!(vapourPressure_Pa > 0) || excess(COLDEST) > 0 || excess(WARMEST) < 0) return Number.NaN
  let [low, high] = [COLDEST, WARMEST]
  while (high - low > 1e-9) {
    const middle = (low + high) / 2
    if (excess(middle) > 0) high = middle
    else low = middle
  }
  return (low + high) / 2
}
