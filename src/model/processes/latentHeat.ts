/**
 * Latent heat of sublimation of hexagonal ice.
 *
 *   L = 46782.5 + 35.8925 T - 0.07414 T^2 + 541.5 exp(-(T/123.75)^2)
 *
 * @param temperature_K temperature, K
 * @returns latent heat, J/mol
 *
 * Source: Murphy and Koop 2005, Q. J. R. Meteorol. Soc. 131, 1539, eq. 5. Range: 30 to 273.16 K.
 */
export function latentHeat(temperature_K: number): number {
  const scaled = temperature_K / 123.75
  return (
    46782.5 +
    35.8925 * temperature_K -
    0.07414 * temperature_K * temperature_K +
    541.5 * Math.exp(-scaled * scaled)
  )
}
