import { EARTH_RADIUS, STANDARD_GRAVITY } from '../constants.ts'

/**
 * Acceleration of gravity at an altitude.
 *
 *   g(z) = g0 (r0 / (r0 + z))^2,  g0 = 9.80665 m/s2, r0 = 6356.766 km
 *
 * @param altitude_m geometric altitude above sea level, m
 * @returns acceleration, m/s2
 *
 * Source: U.S. Standard Atmosphere 1976. Range: any altitude of the atmosphere. The dependence on latitude
 * (about 0.3 % at the pole) is left out.
 */
export function gravity(altitude_m: number): number {
  const ratio = EARTH_RADIUS / (EARTH_RADIUS + altitude_m)
  return STANDARD_GRAVITY * ratio * ratio
}
