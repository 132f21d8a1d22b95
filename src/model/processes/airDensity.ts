import { AIR_MOLECULE_MASS, BOLTZMANN } from '../constants.ts'

/**
 * Mass density of dry air as an ideal gas.
 *
 *   rho = m_air p / (k T)
 *
 * @param temperature_K temperature, K
 * @param pressure_Pa pressure, Pa
 * @returns density, kg/m3
 *
 * Source: ideal gas law. Range: up to about 90 km; above, air grows lighter than 28.9644 g/mol (0.2 % at 90 km, 2 %
 * at 100 km, from the number densities of U.S. Standard Atmosphere 1976, Table VIII).
 */
export function airDensity(temperature_K: number, pressure_Pa: number): number {
  return (AIR_MOLECULE_MASS * pressure_Pa) / (BOLTZMANN * temperature_K)
}
