/** The published formulas for the vapour pressure of hexagonal ice. */
export type SaturationFormula = 'murphyKoop2005' | 'iapws2011' | 'martiMauersberger1993'

/**
 * Range of temperature that each formula was made for, K. Outside it the formula is an extrapolation.
 *
 * Sources: Murphy and Koop 2005 (above 110 K); IAPWS R14-08(2011) (50 to 273.16 K); the range of the measurements
 * of Marti and Mauersberger 1993 is from memory.
 */
export const saturationRange_K: Readonly<
  Record<SaturationFormula, Readonly<{ lowest: number; highest: number }>>
> = {
  murphyKoop2005: { lowest: 110, highest: 273.16 },
  iapws2011: { lowest: 50, highest: 273.16 },
  martiMauersberger1993: { lowest: 170, highest: 250 },
}

/**
 * Vapour pressure in equilibrium with a plane surface of hexagonal ice.
 *
 *   murphyKoop2005         ln p = 9.550426 - 5723.265/T + 3.53068 ln T - 0.00728332 T
 *   iapws2011              ln(p/p_t) = (1/theta) sum a_i theta^b_i, theta = T/T_t, T_t = 273.16 K, p_t = 611.657 Pa
 *   martiMauersberger1993  log10 p = -2663.5/T + 12.537
 *
 * @param formula which of the three
 * @param temperature_K temperature of the ice, K
 * @returns vapour pressure, Pa
 *
 * Sources: Murphy and Koop 2005, Q. J. R. Meteorol. Soc. 131, 1539, eq. 7; IAPWS R14-08(2011), that is Wagner,
 * Riethmann, Feistel and Harvey 2011, J. Phys. Chem. Ref. Data 40, 043103, eq. 6; Marti and Mauersberger 1993,
 * Geophys. Res. Lett. 20, 363. Ranges: `saturationRange_K`.
 *
 * Doubts: the first two differ by 0.1 to 0.3 % below 170 K; the third, extrapolated, is 1 % lower at 150 K, 7 % at
 * 130 K and 18 % at 110 K. No formula rests on measurements of hexagonal ice at the coldest mesopause.
 */
export function saturationPressure(formula: SaturationFormula, temperature_K: number): number {
  switch (formula) {
    case 'murphyKoop2005':
      return Math.exp(
        9.550426 -
          5723.265 / temperature_K +
          3.53068 * Math.log(temperature_K) -
          0.00728332 * temperature_K,
      )
    case 'iapws2011':
      return iapwsPressure(temperature_K / 273.16)
    case 'martiMauersberger1993':
      return 10 ** (-2663.5 / temperature_K + 12.537)
  }
}

/** Pressure in Pa at the reduced temperature theta; exponents with the decimals printed in the release. */
function iapwsPressure(theta: number): number {
  const sum =
    -21.2144006 * theta ** 0.00333333333 +
    27.3203819 * theta ** 1.20666667 -
    6.1059813 * theta ** 1.70333333
  return 611.657 * Math.exp(sum / theta)
}
