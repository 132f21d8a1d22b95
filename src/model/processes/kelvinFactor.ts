import { kelvinRadius } from './kelvinRadius.ts'

/**
 * Factor by which the vapour pressure over a sphere exceeds that over a plane.
 *
 *   K_e = exp(2 sigma v_m / (k T r)) = exp(r_K / r)
 *
 * @param radius_m radius of the sphere, m
 * @param temperature_K temperature, K
 * @param density density of ice, kg/m3
 * @returns factor, 1
 *
 * Source: textbook (Kelvin's law), from memory. Range and doubt: as for `kelvinRadius`.
 */
export function kelvinFactor(radius_m: number, temperature_K: number, density: number): number {
  return Math.exp(kelvinRadius(temperature_K, density) / radius_m)
}
