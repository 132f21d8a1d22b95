/**
 * Surface energy of ice against vapour.
 *
 *   sigma = 0.141 - 1.5e-4 T
 *
 * @param temperature_K temperature, K
 * @returns surface energy, J/m2
 *
 * Source: attributed to Hale and Plummer 1974, J. Chem. Phys. 61, 4012. Range: about 100 to 273 K, common practice.
 * Doubt: some public codes put Celsius into the same expression (0.159 J/m2 at 150 K in place of 0.119). Kelvin is
 * taken: it gives 0.100 at the melting point, near the handbook value of 0.10 to 0.11 J/m2 (from memory).
 */
export function surfaceEnergy(temperature_K: number): number {
  return 0.141 - 1.5e-4 * temperature_K
}
