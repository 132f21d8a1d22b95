import { criticalRadius } from './criticalRadius.ts'

export interface ActivationConditions {
  nucleusRadius_m: number
  temperature_K: number
  /** Vapour pressure over that of the phase that activates, 1. */
  saturationRatio: number
  /** Density of ice, kg/m3. */
  density: number
  /** Time that the activation of a nucleus takes, tau, s. */
  activationTime_s: number
}

/**
 * Rate at which one nucleus becomes ice when it grows without a barrier as soon as it exceeds the critical radius.
 *
 *   rate = 1/tau  where r_K / ln S < r_N, else 0
 *
 * @returns rate per nucleus, 1/s
 *
 * Source: Duft, Nachbar and Leisner 2019, Atmos. Chem. Phys. 19, 2871 (abstract: growth on particles of 1 to 3 nm
 * starts by Kelvin activation of amorphous water, at S below 50 over hexagonal ice); tau is numerical. Range: nuclei
 * that water wets fully. Doubt: the water adsorbed before activation enlarges the particle; it is left out.
 */
export function activationRate(conditions: ActivationConditions): number {
  const germRadius_m = criticalRadius(
    conditions.temperature_K,
    conditions.saturationRatio,
    conditions.density,
  )
  return germRadius_m < conditions.nucleusRadius_m ? 1 / conditions.activationTime_s : 0
}
