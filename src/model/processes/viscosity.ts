/**
 * Dynamic viscosity of air, Sutherland's law.
 *
 *   mu = 1.458e-6 T^1.5 / (T + 110.4)
 *
 * @param temperature_K temperature, K
 * @returns viscosity, Pa s
 *
 * Source: U.S. Standard Atmosphere 1976; 110.4 K as published, 1.458e-6 kg/(m s K^0.5) from memory. Range: about 100
 * to 1900 K, from memory. In free-molecular fall it cancels against the mean free path made from it.
 */
export function viscosity(temperature_K: number): number {
  return (1.458e-6 * temperature_K * Math.sqrt(temperature_K)) / (temperature_K + 110.4)
}
