import { GAS_CONSTANT } from '../constants.ts'

/** Excess of the Gibbs energy over hexagonal ice, J/mol; Nachbar et al. 2018 give 982 +- 182. */
const GIBBS_ENERGY_OFFSET = 982

/**
 * Factor by which the vapour pressure of ice grown from amorphous water exceeds that of hexagonal ice.
 *
 *   p_a / p_h = exp(DG / (R T)),  DG = 982 J/mol
 *
 * @param temperature_K temperature of the ice, K
 * @returns factor, 1 (2.5 at 130 K, 2.2 at 150 K)
 *
 * Source: Nachbar, Duft and Leisner 2018, Atmos. Chem. Phys. 18, 3419 (abstract; its corrigendum was not seen).
 * Range: below 160 K. Doubt: the uncertainty of 182 J/mol is a factor 1.16 to 1.18 at 130 to 150 K.
 */
export function amorphousPressureFactor(temperature_K: number): number {
  return Math.exp(GIBBS_ENERGY_OFFSET / (GAS_CONSTANT * temperature_K))
}
