/** One measured absorption cross-section of ozone: a single wavelength, or the mean of a band. */
export interface OzoneRow {
  from_nm: number
  /** Equal to `from_nm` for a single wavelength. */
  to_nm: number
  temperature_K: number
  crossSection_cm2: number
}

/**
 * Absorption cross-sections of ozone per molecule.
 *
 * Sources, in the order of the blocks; values read in a public copy of each data set:
 * Malicet et al. 1995, J. Atmos. Chem. 21, 263;
 * Molina and Molina 1986, J. Geophys. Res. 91, 14501 (wavelength in air);
 * JPL Publication 06-2, two bands.
 *
 * They differ by 2 to 3 per cent. Nothing was measured below 218 K.
 */
export const ozoneCrossSectionTable: readonly OzoneRow[] = [
  // Malicet et al. 1995
  { from_nm: 265, to_nm: 265, temperature_K: 295, crossSection_cm2: 9.5491e-18 },
  { from_nm: 265, to_nm: 265, temperature_K: 243, crossSection_cm2: 9.3927e-18 },
  { from_nm: 265, to_nm: 265, temperature_K: 228, crossSection_cm2: 9.3642e-18 },
  { from_nm: 265, to_nm: 265, temperature_K: 218, crossSection_cm2: 9.3367e-18 },
  // Molina and Molina 1986
  { from_nm: 265, to_nm: 265, temperature_K: 298, crossSection_cm2: 9.657e-18 },
  { from_nm: 265, to_nm: 265, temperature_K: 263, crossSection_cm2: 9.605e-18 },
  { from_nm: 265, to_nm: 265, temperature_K: 226, crossSection_cm2: 9.612e-18 },
  // JPL Publication 06-2
  { from_nm: 263.158, to_nm: 266.667, temperature_K: 298, crossSection_cm2: 9.68e-18 },
  { from_nm: 263.158, to_nm: 266.667, temperature_K: 218, crossSection_cm2: 9.52e-18 },
  { from_nm: 250, to_nm: 253.165, temperature_K: 298, crossSection_cm2: 1.125e-17 },
  { from_nm: 250, to_nm: 253.165, temperature_K: 218, crossSection_cm2: 1.116e-17 },
]
