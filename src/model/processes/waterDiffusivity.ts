/**
 * Molecular diffusivity of water vapour in air.
 *
 *   D = 2.2e-5 (101325/p) (T/273.15)^1.81
 *
 * @param temperature_K temperature, K
 * @param pressure_Pa pressure, Pa
 * @returns diffusivity, m2/s (about 1 m2/s at 83 km, 20 m2/s at 96 km)
 *
 * Source: from memory. Range: measured near room temperature; extrapolated here to 130 K.
 */
export function waterDiffusivity(temperature_K: number, pressure_Pa: number): number {
  return 2.2e-5 * (101325 / pressure_Pa) * (temperature_K / 273.15) ** 1.81
}
