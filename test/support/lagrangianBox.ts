import { BOLTZMANN, WATER_MOLECULE_MASS } from '../../src/model/constants.ts'

/** Particles of one size. */
export interface Population {
  radius_m: number
  number_per_m3: number
}

/** A volume of air with water vapour and ice, for integration apart from the model. */
export interface Box {
  temperature_K: number
  /** Vapour per volume at the start, 1/m3. */
  vapour_per_m3: number
  /** Whether growth and sublimation change the vapour. */
  closed: boolean
  /** Saturation pressure over a flat surface, Pa. */
  saturation_Pa: number
}

/** Ice of 932 kg/m3; common practice, no source. */
export const MOLECULE_VOLUME = WATER_MOLECULE_MASS / 932

/** Murphy and Koop 2005, Q. J. R. Meteorol. Soc. 131, 1539, eq. 7; Pa. */
export function murphyKoop(T: number): number {
  return Math.exp(9.550426 - 5723.265 / T + 3.53068 * Math.log(T) - 0.00728332 * T)
}

/** Growth per excess pressure, alpha v_m/sqrt(2 pi m k T), alpha 0.83 (common practice, from memory); m/(s Pa). */
export function uptake(T: number): number {
  return (0.83 * MOLECULE_VOLUME) / Math.sqrt(2 * Math.PI * WATER_MOLECULE_MASS * BOLTZMANN * T)
}

/** Particles below this radius count as gone, m. */
const VANISHED = 1e-9

/**
 * Radii after a time of populations that keep their numbers and share one vapour,
 *   dr_j/dt = a (e - p_s exp(r_K/r_j)),  e = k T (n - sum N_j (4/3) pi (r_j^3 - r_j(0)^3)/v_m),
 * by the classical Runge-Kutta rule in fixed steps. Radius zero for particles that have gone. r_K = 2 sigma v_m/(k T), sigma = 0.141 - 1.5e-4 T J/m2
 * (Hale and Plummer 1974).
 */
export function grow(
  populations: readonly Population[],
  box: Box,
  { time_s, step_s }: { time_s: number; step_s: number },
): Population[] {
  const { temperature_K: T, saturation_Pa } = box
  const kelvin_m = (2 * (0.141 - 1.5e-4 * T) * MOLECULE_VOLUME) / (BOLTZMANN * T)
  const present = (r: number) => (r > VANISHED ? 1 : 0)
  const rates = (radii: readonly number[]) => {
    const vapour = vapourLeft(populations, radii, box)
    return radii.map(
      (r) =>
        present(r) *
        uptake(T) *
        (vapour * BOLTZMANN * T - saturation_Pa * Math.exp(kelvin_m / Math.max(r, VANISHED))),
    )
  }
  const moved = (radii: readonly number[], slope: readonly number[], h: number) =>
    radii.map((r, j) => r + h * slope[j])
  let radii = populations.map(({ radius_m }) => radius_m)
  for (let i = 0; i < Math.round(time_s / step_s); i++) {
    const k1 = rates(radii)
    const k2 = rates(moved(radii, k1, step_s / 2))
    const k3 = rates(moved(radii, k2, step_s / 2))
    const k4 = rates(moved(radii, k3, step_s))
    const mean = k1.map((rate, j) => (rate + 2 * k2[j] + 2 * k3[j] + k4[j]) / 6)
    radii = moved(radii, mean, step_s).map((r) => present(r) * r)
  }
  return populations.map(({ number_per_m3 }, j) => ({ number_per_m3, radius_m: radii[j] }))
}

/** Vapour that is left when the populations have reached other radii, 1/m3. */
export function vapourLeft(
  populations: readonly Population[],
  radii: readonly number[],
  { closed, vapour_per_m3 }: Box,
): number {
  if (!closed) return vapour_per_m3
  const cubes = populations.reduce(
    (sum, { radius_m, number_per_m3 }, j) => sum + number_per_m3 * (radii[j] ** 3 - radius_m ** 3),
    0,
  )
  return vapour_per_m3 - ((4 / 3) * Math.PI * cubes) / MOLECULE_VOLUME
}

/** Moment sum N r^p. */
export function moment(populations: readonly Population[], power: number): number {
  return populations.reduce(
    (sum, { radius_m, number_per_m3 }) =>
      sum + (radius_m > 0 ? number_per_m3 * radius_m ** power : 0),
    0,
  )
}
