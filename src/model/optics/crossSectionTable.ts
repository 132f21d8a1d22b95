import type { RefractiveIndex } from './refractiveIndex.ts'
import type { Scatterer } from './scatterer.ts'

/** One wavelength and direction of light. */
export interface ScatteringChannel {
  wavelength_m: number
  refractiveIndex: RefractiveIndex
  /** pi is straight back. */
  scatteringAngle_rad: number
}

/**
 * Differential cross-section of each size class in one channel, made once per run.
 *
 * @param scatterer law of scattering
 * @param radii_m radii of the classes, m
 * @param channel wavelength, refractive index and direction
 * @returns cross-sections per solid angle in the order of the radii, m2/sr
 */
export function crossSectionTable(
  scatterer: Scatterer,
  radii_m: ArrayLike<number>,
  channel: ScatteringChannel,
): Float64Array {
  const { wavelength_m, refractiveIndex, scatteringAngle_rad } = channel
  return Float64Array.from(radii_m, (radius_m) =>
    scatterer(radius_m, wavelength_m, refractiveIndex, scatteringAngle_rad),
  )
}
