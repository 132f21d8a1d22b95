import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { frostPoint } from '../../../src/model/diagnostics/frostPoint.ts'
import { saturationPressure } from '../../../src/model/processes/saturationPressure.ts'

describe('the frost point', () => {
  it('is the temperature of the saturation table, Murphy and Koop 2005, Table C1', () => {
    // Read in public copies: 6.106e-6 Pa at 150 K, 0.0053975 Pa at 180 K; four and five digits hold 1e-3 K.
    expect(frostPoint('murphyKoop2005', 6.106e-6)).toBeCloseTo(150, 2)
    expect(frostPoint('murphyKoop2005', 0.0053975)).toBeCloseTo(180, 3)
  })

  it('turns every saturation pressure back into its temperature', () => {
    const formulas = ['murphyKoop2005', 'iapws2011', 'martiMauersberger1993'] as const
    const temperature = fc.double({ min: 62, max: 270, noNaN: true })
    fc.assert(
      fc.property(fc.constantFrom(...formulas), temperature, (formula, temperature_K) => {
        const found = frostPoint(formula, saturationPressure(formula, temperature_K))
        expect(Math.abs(found - temperature_K)).toBeLessThan(1e-8)
      }),
      { seed: 83 },
    )
  })

  it('is none without vapour, and none beyond the range it is told in', () => {
    expect(frostPoint('murphyKoop2005', 0)).toBeNaN()
    expect(frostPoint('murphyKoop2005', -1)).toBeNaN()
    expect(frostPoint('murphyKoop2005', 1e9)).toBeNaN()
  })
})
