import { airDensity } from './airDensity.ts'
import { type FallConditions, freeLimit } from './fallSpeed.ts'
import { VISCOSITY_FACTOR } from './meanFreePath.ts'
import { meanMolecularSpeed } from './meanMolecularSpeed.ts'
import { viscosity } from './viscosity.ts'

/** Coefficients of v(r) = linear r + quadratic r^2 + cubic r^3. */
export interface FallSpeedSeries {
  /** 1/s */
  linear: number
  /** 1/(m s) */
  quadratic: number
  /** 1/(m2 s) */
  cubic: number
}

/**
 * The fall speed of `fallSpeed` as a series in r/lambda, for air whose mean free path lambda is far larger than the
 * particle, so that all radii of a level share three coefficients:
 *   v = (2 rho g/(9 mu)) [lambda A r + (1 - 1.10 B) r^2 + 0.605 B r^3/lambda],  B = A - 1.257.
 * The first term left out is 0.22 B (r/lambda)^3/A of the whole: 1e-13 for 150 nm at 83 km, 1e-10 at 60 km.
 *
 * Source: series of the exponential in the slip correction (Davies 1945; Epstein 1924).
 */
export function fallSpeedSeries(conditions: Omit<FallConditions, 'radius_m'>): FallSpeedSeries {
  const { temperature_K, pressure_Pa, density, gravity } = conditions
  const limit = freeLimit(conditions)
  const passage = limit - 1.257
  const mu = viscosity(temperature_K)
  const path_m =
    mu /
    (VISCOSITY_FACTOR * airDensity(temperature_K, pressure_Pa) * meanMolecularSpeed(temperature_K))
  const stokes = (2 * density * gravity) / (9 * mu)
  return {
    linear: stokes * path_m * limit,
    quadratic: stokes * (1 - 1.1 * passage),
    cubic: (stokes * 0.605 * passage) / path_m,
  }
}
