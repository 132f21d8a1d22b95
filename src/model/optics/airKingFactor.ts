/** Carbon dioxide as a share of the air by volume, 1: the 360 ppm to which Bodhaine et al. 1999 refer. */
export const CARBON_DIOXIDE_SHARE = 360e-6

/**
 * King factor of dry air: how much the anisotropy of its molecules adds to their scattering.
 *
 *   F = [78.084 F(N2) + 20.946 F(O2) + 0.934 F(Ar) + C F(CO2)] / (78.084 + 20.946 + 0.934 + C),  C in per cent
 *   F(N2) = 1.034 + 3.17e-4/lambda^2,  F(O2) = 1.096 + 1.385e-3/lambda^2 + 1.448e-4/lambda^4,  lambda in um
 *   F(Ar) = 1,  F(CO2) = 1.15
 *
 * @param wavelength_m wavelength in vacuum, m
 * @returns King factor, 1
 *
 * Source: Bodhaine et al. 1999, J. Atmos. Oceanic Technol. 16, 1854, formula read in public copies. Range: 0.25 to
 * 1.1 um.
 */
export function airKingFactor(wavelength_m: number): number {
  const inverseSquare = 1 / (wavelength_m * 1e6) ** 2
  const nitrogen = 1.034 + 3.17e-4 * inverseSquare
  const oxygen = 1.096 + 1.385e-3 * inverseSquare + 1.448e-4 * inverseSquare ** 2
  const carbonDioxide_percent = 100 * CARBON_DIOXIDE_SHARE
  const sum = 78.084 * nitrogen + 20.946 * oxygen + 0.934 + carbonDioxide_percent * 1.15
  return sum / (78.084 + 20.946 + 0.934 + carbonDioxide_percent)
}
