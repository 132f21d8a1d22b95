import { AIR_MOLECULE_MASS, BOLTZMANN } from '../../src/model/constants.ts'
import { gravity } from '../../src/model/processes/gravity.ts'

/** The altitude that the exponential air hangs on, m. */
export const MIDDLE_M = 84e3

/** Temperature there, K. */
const MIDDLE_K = 140

/**
 * Air whose density falls as exp(-z/H) to within 1e-5 of itself over 20 km: its temperature is proportional to
 * gravity, so that d(ln n0)/dz = -m g/(k T) - (dg/dz)/g hardly varies. Without that, gravity, which falls by 0.3 % in
 * 10 km, would spoil closed forms that need one scale height.
 */
export const EXPONENTIAL_AIR = {
  pressure: { altitude_km: MIDDLE_M / 1000, pressure_Pa: 0.6 },
  temperature: {
    knots: Array.from({ length: 81 }, (_, i) => 60 + i / 2).map((altitude_km) => ({
      altitude_km,
      temperature_K: (MIDDLE_K * gravity(1000 * altitude_km)) / gravity(MIDDLE_M),
    })),
  },
}

/** Density scale height of that air, m: 1/H = m g/(k T) + (dg/dz)/g, with g ~ (r0 + z)^-2. */
export const SCALE_HEIGHT_M =
  1 /
  ((AIR_MOLECULE_MASS * gravity(MIDDLE_M)) / (BOLTZMANN * MIDDLE_K) - 2 / (6_356_766 + MIDDLE_M))
