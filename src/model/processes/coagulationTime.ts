import { type Collider, collisionKernel } from './collisionKernel.ts'

/**
 * Time in which Brownian coagulation among equal spheres halves their number.
 *
 *   dN/dt = -K N^2 / 2,  so  t = 2 / (K N)
 *
 * This number is why the model leaves coagulation out: 100 per cm3 of 50 nm ice spheres at 150 K take 50 days, a
 * cloud lives for hours. Not covered by it: nuclei struck by ice. In the same cloud a nucleus of 1 nm (2000 kg/m3)
 * meets an ice particle after 14 hours, one of 2 nm after 37 hours; so in dense, long-lived clouds the smallest free
 * nuclei are somewhat overstated. Charge and unequal fall are left out as well.
 *
 * @param sphere radius in m and density in kg/m3
 * @param number_per_m3 number density, 1/m3
 * @param temperature_K temperature of the air, K
 * @returns time, s
 *
 * Source: Smoluchowski's equation, textbook, from memory; numbers computed from the formula. Range: as for
 * `collisionKernel`.
 */
export function coagulationTime(
  sphere: Collider,
  number_per_m3: number,
  temperature_K: number,
): number {
  return 2 / (collisionKernel(sphere, sphere, temperature_K) * number_per_m3)
}
