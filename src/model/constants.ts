/**
 * Physical constants in SI units. Exact constants are those of the SI (CODATA 2022 prints the same digits);
 * every other value names its source.
 */

/** Boltzmann constant, J/K; exact in the SI. */
export const BOLTZMANN = 1.380649e-23

/** Avogadro constant, 1/mol; exact in the SI. */
export const AVOGADRO = 6.02214076e23

/** Molar gas constant, J/(mol K); product of two exact constants. */
export const GAS_CONSTANT = BOLTZMANN * AVOGADRO

/** Standard gravity at sea level, m/s2; U.S. Standard Atmosphere 1976. */
export const STANDARD_GRAVITY = 9.80665

/** Effective Earth radius, m; U.S. Standard Atmosphere 1976. */
export const EARTH_RADIUS = 6356766

/** Molar mass of dry air below 86 km, kg/mol; U.S. Standard Atmosphere 1976. */
export const AIR_MOLAR_MASS = 28.9644e-3

/** Mean mass of an air molecule, kg. */
export const AIR_MOLECULE_MASS = AIR_MOLAR_MASS / AVOGADRO

/** Molar mass of water, kg/mol; common handbook value. */
export const WATER_MOLAR_MASS = 18.01528e-3

/** Mass of a water molecule, kg. */
export const WATER_MOLECULE_MASS = WATER_MOLAR_MASS / AVOGADRO

/** Specific heat of dry air at constant pressure, J/(kg K); common practice (7/2 R/M is 1004.7). */
export const AIR_HEAT_CAPACITY = (3.5 * GAS_CONSTANT) / AIR_MOLAR_MASS
