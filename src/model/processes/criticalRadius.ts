import { kelvinRadius } from './kelvinRadius.ts'

/**
 * Radius of the ice germ in unstable equilibrium with the vapour.
 *
 *   r* = 2 sigma v_m / (k T ln S) = r_K / ln S
 *
 * @param temperature_K temperature, K
 * @param saturationRatio vapour pressure over that of plane ice, 1
 * @param density density of ice, kg/m3
 * @returns radius, m; infinite without supersaturation
 *
 * Source: textbook, from memory. Range: S above 1; as for `kelvinRadius` otherwise.
 */
export function criticalRadius(
  temperature_K: number,
  saturationRatio: number,
  density: number,
): number {
  if (saturationRatio <= 1) return Number.POSITIVE_INFINITY
  return kelvinRadius(temperature_K, density) / Math.log(saturationRatio)
}
