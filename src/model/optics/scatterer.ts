import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * A law of scattering by one particle in unpolarised light: radius, wavelength, refractive index and scattering angle
 * give the differential cross-section in m2/sr. Every such law fits wherever another one does.
 */
export type Scatterer = (
  radius_m: number,
  wavelength_m: number,
  index: RefractiveIndex,
  angle_rad: number,
) => number
