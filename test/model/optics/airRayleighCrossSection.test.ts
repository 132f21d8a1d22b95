import { describe, expect, it } from 'vitest'
import { airKingFactor } from '../../../src/model/optics/airKingFactor.ts'
import { airRayleighCrossSection } from '../../../src/model/optics/airRayleighCrossSection.ts'
import { airRayleighDifferential } from '../../../src/model/optics/airRayleighDifferential.ts'

/**
 * Computed independently from the formula of Bodhaine et al. 1999 with 360 ppm of carbon dioxide: wavelength in um, cross-
 * section in cm2, King factor, differential cross-section straight back in cm2/sr.
 */
const rows: readonly (readonly [number, number, number, number])[] = [
  [0.252, 1.21659e-25, 1.0627, 1.42649e-26],
  [0.265, 9.72059e-26, 1.06052, 1.14045e-26],
  [0.3, 5.65249e-26, 1.05643, 6.63904e-27],
  [0.355, 2.75885e-26, 1.05289, 3.24351e-27],
  [0.4, 1.67383e-26, 1.05126, 1.96876e-27],
  [0.5, 6.66136e-27, 1.04935, 7.83924e-28],
  [0.532, 5.16727e-27, 1.04899, 6.08156e-28],
  [0.55, 4.51054e-27, 1.04882, 5.30888e-28],
  [0.589, 3.4115e-27, 1.04851, 4.01565e-28],
  [0.7, 1.69255e-27, 1.04793, 1.99261e-28],
  [1.064, 3.12694e-28, 1.04721, 3.68202e-29],
]

describe('scattering by a molecule of air', () => {
  it('equals the independent rows, total, King factor and straight back', () => {
    for (const [wavelength_um, total_cm2, kingFactor, back_cm2] of rows) {
      const wavelength_m = wavelength_um * 1e-6
      const place = `${wavelength_um} um`
      // Six digits given: half a unit of the last one is at most 5e-6.
      const total = airRayleighCrossSection(wavelength_m) * 1e4
      expect(Math.abs(total / total_cm2 - 1), place).toBeLessThan(5e-6)
      const back = airRayleighDifferential(wavelength_m, Math.PI) * 1e4
      expect(Math.abs(back / back_cm2 - 1), place).toBeLessThan(5e-6)
      expect(Math.abs(airKingFactor(wavelength_m) - kingFactor), place).toBeLessThan(0.51e-5)
    }
  })

  it('agrees with the fit of Nicolet 1984 within 1 per cent', () => {
    // sigma = 4.02e-28 cm2/lambda^(4 + x), x = 0.389 lambda + 0.09426/lambda - 0.3228, lambda in um, stated to 0.5 per
    // cent; read in an abstract. It ends at 0.55 um, from where x is 0.04, from memory.
    for (const lambda of [
      0.252, 0.265, 0.28, 0.3, 0.355, 0.4, 0.45, 0.5, 0.532, 0.55, 0.7, 1.064,
    ]) {
      const exponent = lambda < 0.55 ? 4 + 0.389 * lambda + 0.09426 / lambda - 0.3228 : 4.04
      const fit_m2 = 4.02e-32 / lambda ** exponent
      const found = airRayleighCrossSection(lambda * 1e-6)
      expect(Math.abs(found / fit_m2 - 1), `${lambda} um`).toBeLessThan(0.01)
    }
  })

  it('agrees with the short fit of the same publication', () => {
    // sigma = 1e-28 cm2 (1.0455996 - 341.29061/l^2 - 0.9023085 l^2)/(1 + 0.0027059889/l^2 - 85.968563 l^2), Bodhaine et
    // al. 1999, coefficients read in public copies; 1e-4 from 0.25 to 0.7 um.
    for (const lambda of [0.252, 0.265, 0.3, 0.355, 0.4, 0.5, 0.589, 0.7]) {
      const square = lambda * lambda
      const top = 1.0455996 - 341.29061 / square - 0.9023085 * square
      const bottom = 1 + 0.0027059889 / square - 85.968563 * square
      const found = airRayleighCrossSection(lambda * 1e-6)
      expect(Math.abs((found * 1e32 * bottom) / top - 1), `${lambda} um`).toBeLessThan(1e-4)
    }
  })

  it('integrates over all directions to its total', () => {
    for (const wavelength_m of [265e-9, 532e-9, 1064e-9]) {
      const at = (cosine: number) => airRayleighDifferential(wavelength_m, Math.acos(cosine))
      // Simpson's rule on three points is exact for the square in cos Theta that the pattern is.
      const integral = ((2 * Math.PI) / 3) * (at(-1) + 4 * at(0) + at(1))
      expect(integral / airRayleighCrossSection(wavelength_m)).toBeCloseTo(1, 13)
    }
  })
})
