import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  type SaturationFormula,
  saturationPressure,
  saturationRange_K,
} from '../../../src/model/processes/saturationPressure.ts'

const formulas: SaturationFormula[] = ['murphyKoop2005', 'iapws2011', 'martiMauersberger1993']

describe('vapour pressure over hexagonal ice', () => {
  it('gives the verification value of IAPWS R14-08(2011), Table 3', () => {
    // 230 K: 8.94735 Pa, read in public copies; six digits printed.
    const error = saturationPressure('iapws2011', 230) - 8.94735
    expect(Math.abs(error)).toBeLessThanOrEqual(0.5e-5)
  })

  it('gives the table of Murphy and Koop 2005 to its printed digits', () => {
    // Murphy and Koop 2005, Q. J. R. Meteorol. Soc. 131, 1539, Table C1, read in two public copies.
    // Half a unit of the last printed digit.
    const table: [number, number, number][] = [
      [150, 6.106e-6, 0.5e-9],
      [180, 0.0053975, 0.5e-7],
      [210, 0.70202, 0.5e-5],
      [240, 27.272, 0.5e-3],
      [273.15, 611.154, 0.5e-3],
      [273.16, 611.657, 0.5e-3],
    ]
    for (const [temperature_K, pressure_Pa, halfDigit] of table) {
      const error = saturationPressure('murphyKoop2005', temperature_K) - pressure_Pa
      expect(Math.abs(error), `${temperature_K} K`).toBeLessThanOrEqual(halfDigit)
    }
  })

  it('gives all three formulas at the temperatures of the mesopause', () => {
    // Computed independently at high precision from the published formulas; ten digits.
    const table: [number, number, number, number][] = [
      [110, 2.56917421e-12, 2.576655179e-12, 2.105540679e-12],
      [120, 2.4813105e-10, 2.488063946e-10, 2.193646617e-10],
      [130, 1.200168529e-8, 1.203057572e-8, 1.118248853e-8],
      [140, 3.365918757e-7, 3.372824871e-7, 3.250872974e-7],
      [150, 6.095724512e-6, 6.106100651e-6, 6.030222452e-6],
      [160, 7.729517628e-5, 7.740209086e-5, 7.764705707e-5],
      [200, 1.626040176e-1, 1.626914462e-1, 1.657677337e-1],
    ]
    for (const [temperature_K, iapws, murphyKoop, martiMauersberger] of table) {
      expect(saturationPressure('iapws2011', temperature_K) / iapws).toBeCloseTo(1, 8)
      expect(saturationPressure('murphyKoop2005', temperature_K) / murphyKoop).toBeCloseTo(1, 8)
      expect(
        saturationPressure('martiMauersberger1993', temperature_K) / martiMauersberger,
      ).toBeCloseTo(1, 8)
    }
  })

  it('rises with temperature in every formula', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...formulas),
        fc.double({ min: 100, max: 272, noNaN: true }),
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        (formula, temperature_K, step_K) => {
          expect(saturationPressure(formula, temperature_K + step_K)).toBeGreaterThan(
            saturationPressure(formula, temperature_K),
          )
        },
      ),
      { seed: 1 },
    )
  })

  it('states the range that each formula was made for', () => {
    // Murphy and Koop 2005 and IAPWS R14-08(2011) as published; 170 to 250 K from memory.
    expect(saturationRange_K.murphyKoop2005.lowest).toBe(110)
    expect(saturationRange_K.iapws2011).toEqual({ lowest: 50, highest: 273.16 })
    expect(saturationRange_K.martiMauersberger1993).toEqual({ lowest: 170, highest: 250 })
  })
})
