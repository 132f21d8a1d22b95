import { meanFreePath, VISCOSITY_FACTOR } from './meanFreePath.ts'
import { viscosity } from './viscosity.ts'

/** How the drag passes from single molecules to a viscous gas. */
export type SlipLaw = 'epsteinStokes' | 'davies'

export interface FallConditions {
  radius_m: number
  temperature_K: number
  pressure_Pa: number
  /** Acceleration of gravity, m/s2. */
  gravity: number
  /** Density of the particle, kg/m3. */
  density: number
  /** Epstein's delta: 1 specular, 1 + pi/8 diffuse reflection. Of no effect with 'davies'. */
  dragDelta: number
  slip: SlipLaw
}

/**
 * Terminal speed of a small sphere in still air, positive downward.
 *
 *   v = (2/9) rho g r^2 Cc / mu,  Cc = 1 + Kn [1.257 + (A - 1.257) exp(-1.10/Kn)],  Kn = lambda/r
 *   epsteinStokes  A = 0.499 x 9/(2 delta), so that v tends to rho g r/(rho_air vbar delta) at large Kn
 *   davies         A = 1.257 + 0.400, so that delta is in effect 1.355
 *
 * @returns speed, m/s (5.2 cm/s for 50 nm at 150 K, 0.8 Pa, diffuse)
 *
 * Sources: Epstein 1924, Phys. Rev. 23, 710; Davies 1945, Proc. Phys. Soc. 57, 259 (coefficients 1.257, 0.400, 1.10;
 * page from memory). The joint with Epstein's limit is an interpolation of this program. Range: spheres of speed far
 * below that of the molecules. Doubt: delta; a dusty-plasma experiment gave about 1.26.
 */
export function fallSpeed(conditions: FallConditions): number {
  const { radius_m, temperature_K, pressure_Pa } = conditions
  const knudsen = meanFreePath(temperature_K, pressure_Pa) / radius_m
  const slip = 1 + knudsen * (1.257 + (freeLimit(conditions) - 1.257) * Math.exp(-1.1 / knudsen))
  return (
    (2 * conditions.density * conditions.gravity * radius_m * radius_m * slip) /
    (9 * viscosity(temperature_K))
  )
}

/** The slip correction over the Knudsen number in the free-molecular limit, A. */
export function freeLimit({ slip, dragDelta }: Pick<FallConditions, 'slip' | 'dragDelta'>): number {
  return slip === 'davies' ? 1.257 + 0.4 : (VISCOSITY_FACTOR * 9) / (2 * dragDelta)
}
