import { BOLTZMANN } from '../constants.ts'
import { criticalRadius } from './criticalRadius.ts'
import { fletcherFactor } from './fletcherFactor.ts'
import { impingementRate } from './impingementRate.ts'
import { moleculeVolume } from './moleculeVolume.ts'
import { surfaceEnergy } from './surfaceEnergy.ts'

export interface NucleationParameters {
  /** Cosine of the contact angle of ice on the nucleus, m_c, 1. */
  contactParameter: number
  /** Energy of desorption of one molecule, F_des, J. */
  desorptionEnergy_J: number
  /** Energy of surface diffusion of one molecule, F_sd, J. */
  surfaceDiffusionEnergy_J: number
  /** Frequency of vibration of an adsorbed molecule, nu, 1/s. */
  vibrationFrequency_per_s: number
  /** Length of one jump of surface diffusion, d, m. */
  jumpDistance_m: number
}

export interface NucleationConditions {
  nucleusRadius_m: number
  temperature_K: number
  /** Partial pressure of water vapour, Pa. */
  vapourPressure_Pa: number
  /** Vapour pressure over that of the phase that nucleates, 1. */
  saturationRatio: number
  /** Density of ice, kg/m3. */
  density: number
  parameters: NucleationParameters
}

/**
 * Rate at which one nucleus gets its germ of ice, by classical heterogeneous nucleation from adsorbed vapour.
 *
 *   J    = 4 pi r_N^2 Z c1 [2 pi r* c1 nu d exp(-F_sd/kT) + pi r*^2 beta] exp(-DF/kT)
 *   beta = e / sqrt(2 pi m k T)            impinging flux
 *   c1   = (beta/nu) exp(F_des/kT)         adsorbed molecules per area
 *   r*   = 2 sigma v_m / (kT ln S)         critical radius
 *   g*   = 4 pi r*^3 / (3 v_m)             molecules in a whole germ
 *   DF   = (4/3) pi sigma r*^2 f(m_c, r_N/r*)   barrier
 *   Z    = sqrt(DF/(3 pi kT)) / g*         Zeldovich factor
 *
 * @returns rate per nucleus, 1/s; 0 without supersaturation
 *
 * Source: classical theory as in textbooks, with the geometric factor of Fletcher 1958, J. Chem. Phys. 29, 572; from
 * memory. Range: germs of tens of molecules and more. Doubts: the contact parameter (0.84 to 0.98 measured on dusts
 * at 158 to 185 K, Iraci et al. 2010, Icarus) and the energies (from memory) move J by many powers of ten; so the
 * rate says at which supersaturation nuclei activate, not how fast they do.
 */
export function nucleationRate(conditions: NucleationConditions): number {
  const { nucleusRadius_m, temperature_K, saturationRatio, density, parameters } = conditions
  if (saturationRatio <= 1) return 0
  const thermalEnergy_J = BOLTZMANN * temperature_K
  const beta = impingementRate(conditions.vapourPressure_Pa, temperature_K)
  const germRadius_m = criticalRadius(temperature_K, saturationRatio, density)
  const geometry = fletcherFactor(parameters.contactParameter, nucleusRadius_m / germRadius_m)
  const barrier = germBarrier(temperature_K, germRadius_m) * geometry
  const germMolecules = (4 * Math.PI * germRadius_m ** 3) / (3 * moleculeVolume(density))
  const zeldovich = Math.sqrt(barrier / (3 * Math.PI)) / germMolecules
  const adsorbed_per_m2 =
    (beta / parameters.vibrationFrequency_per_s) *
    Math.exp(parameters.desorptionEnergy_J / thermalEnergy_J)
  const jumps_per_m_s =
    adsorbed_per_m2 *
    parameters.vibrationFrequency_per_s *
    parameters.jumpDistance_m *
    Math.exp(-parameters.surfaceDiffusionEnergy_J / thermalEnergy_J)
  const supply_per_s = Math.PI * germRadius_m * (2 * jumps_per_m_s + germRadius_m * beta)
  const nucleusArea_m2 = 4 * Math.PI * nucleusRadius_m * nucleusRadius_m
  return nucleusArea_m2 * adsorbed_per_m2 * zeldovich * supply_per_s * Math.exp(-barrier)
}

/** Barrier of a whole spherical germ in units of kT: (4/3) pi sigma r*^2 / (kT). */
function germBarrier(temperature_K: number, germRadius_m: number): number {
  const area_m2 = 4 * Math.PI * germRadius_m * germRadius_m
  return (area_m2 * surfaceEnergy(temperature_K)) / (3 * BOLTZMANN * temperature_K)
}
