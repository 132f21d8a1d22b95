import { airKingFactor, CARBON_DIOXIDE_SHARE } from './airKingFactor.ts'

/** Molecules in a volume of air at 288.15 K and 1013.25 hPa, 1/m3; Bodhaine et al. 1999, read in public copies. */
const STANDARD_DENSITY = 2.546899e25

/**
 * Total scattering cross-section of one molecule of dry air (Rayleigh), with 360 ppm of carbon dioxide.
 *
 *   sigma = 24 pi^3 (n^2 - 1)^2 F / [lambda^4 N_s^2 (n^2 + 2)^2],  F King factor, N_s density to which n belongs
 *   (n_300 - 1) 1e8 = 8060.51 + 2480990/(132.274 - lambda^-2) + 17455.7/(39.32957 - lambda^-2),  lambda in um
 *   n - 1 = (n_300 - 1)[1 + 0.54 (C - 0.0003)],  C share of carbon dioxide
 *
 * @param wavelength_m wavelength in vacuum, m
 * @returns cross-section, m2
 *
 * Source: Bodhaine et al. 1999, J. Atmos. Oceanic Technol. 16, 1854, formula read in public copies (some with misprinted
 * digits). Range: 0.25 to 1.1 um; another fit (Nicolet 1984) agrees within 1 per cent.
 */
export function airRayleighCrossSection(wavelength_m: number): number {
  const inverseSquare = 1 / (wavelength_m * 1e6) ** 2
  const reference =
    1e-8 * (8060.51 + 2480990 / (132.274 - inverseSquare) + 17455.7 / (39.32957 - inverseSquare))
  const surplus = reference * (1 + 0.54 * (CARBON_DIOXIDE_SHARE - 0.0003))
  const square = (1 + surplus) ** 2
  const lorentz = (square - 1) / (square + 2)
  const perDensity = lorentz / (wavelength_m ** 2 * STANDARD_DENSITY)
  return 24 * Math.PI ** 3 * perDensity ** 2 * airKingFactor(wavelength_m)
}
