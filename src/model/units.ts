/**
 * Conversions between the units of scenario keys and output columns and SI. Inside the model everything is SI.
 */

export const HOUR = 3600
export const DAY = 86400
export const KILOMETRE = 1e3
export const NANOMETRE = 1e-9
/** Parts per million by volume, as a mole fraction. */
export const PPMV = 1e-6
/** One particle per cubic centimetre, in 1/m3. */
export const PER_CUBIC_CENTIMETRE = 1e6
/** One nanogram, in kg. */
export const NANOGRAM = 1e-12
/** One microgram, in kg. */
export const MICROGRAM = 1e-9
export const DEGREE = Math.PI / 180
