import { BOLTZMANN } from '../constants.ts'

/** A sphere that takes part in collisions. */
export interface Collider {
  radius_m: number
  /** kg/m3 */
  density: number
}

/**
 * Brownian collision kernel of two kinds of spheres in the free-molecular regime, each collision counted as sticking.
 *
 *   K = pi (r1 + r2)^2 sqrt(8 k T / (pi mu)),  1/mu = 1/m1 + 1/m2
 *
 * @param first one kind of sphere
 * @param second the other kind
 * @param temperature_K temperature of the air, K
 * @returns kernel, m3/s
 *
 * Source: kinetic theory of gases, textbook, from memory. Range: spheres far smaller than the mean free path, without
 * charge or attraction.
 */
export function collisionKernel(first: Collider, second: Collider, temperature_K: number): number {
  const reach_m = first.radius_m + second.radius_m
  const inverseMass = 1 / mass(first) + 1 / mass(second)
  return (
    Math.PI * reach_m * reach_m * Math.sqrt((8 * BOLTZMANN * temperature_K * inverseMass) / Math.PI)
  )
}

function mass({ radius_m, density }: Collider): number {
  return ((4 * Math.PI) / 3) * density * radius_m ** 3
}
