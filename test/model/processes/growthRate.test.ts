import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { growthRate } from '../../../src/model/processes/growthRate.ts'
import { impingementRate } from '../../../src/model/processes/impingementRate.ts'
import { saturationPressure } from '../../../src/model/processes/saturationPressure.ts'

describe('growth of a particle', () => {
  it('is 4.9 nm per hour at 145 K with 3 ppmv at 0.776 Pa and an accommodation of one', () => {
    // Computed independently from the written formula, S = 1.54, no curvature; two digits kept.
    const equilibriumPressure_Pa = saturationPressure('murphyKoop2005', 145)
    const vapourPressure_Pa = 3e-6 * 0.776
    const rate = growthRate({
      accommodation: 1,
      density: 932,
      temperature_K: 145,
      vapourPressure_Pa,
      equilibriumPressure_Pa,
    })
    expect(Math.abs(vapourPressure_Pa / equilibriumPressure_Pa - 1.54)).toBeLessThan(0.005)
    expect(Math.abs(rate * 3600 * 1e9 - 4.9)).toBeLessThan(0.05)
  })

  const conditions = fc.record({
    accommodation: fc.double({ min: 0.01, max: 1, noNaN: true }),
    density: fc.double({ min: 850, max: 950, noNaN: true }),
    temperature_K: fc.double({ min: 110, max: 180, noNaN: true }),
    vapourPressure_Pa: fc.double({ min: 1e-9, max: 1e-3, noNaN: true }),
    equilibriumPressure_Pa: fc.double({ min: 1e-9, max: 1e-3, noNaN: true }),
  })

  it('has the sign of the vapour excess and vanishes without one', () => {
    fc.assert(
      fc.property(conditions, (any) => {
        const rate = growthRate(any)
        const excess_Pa = any.vapourPressure_Pa - any.equilibriumPressure_Pa
        expect(Math.sign(rate)).toBe(Math.sign(excess_Pa))
        const balanced = growthRate({ ...any, vapourPressure_Pa: any.equilibriumPressure_Pa })
        expect(balanced).toBe(0)
      }),
      { seed: 2 },
    )
  })

  it('turns round when vapour and equilibrium pressure change places', () => {
    fc.assert(
      fc.property(conditions, (any) => {
        const swapped = growthRate({
          ...any,
          vapourPressure_Pa: any.equilibriumPressure_Pa,
          equilibriumPressure_Pa: any.vapourPressure_Pa,
        })
        expect(swapped).toBeCloseTo(-growthRate(any), 20)
      }),
      { seed: 3 },
    )
  })
})

describe('impinging flux of vapour', () => {
  it('is a quarter of number density times mean speed', () => {
    // Kinetic theory: beta = n vbar/4, n = e/(kT), vbar = sqrt(8 k N_A T/(pi M)); only rounding is left.
    const molecules = 1e-6 / (1.380649e-23 * 150)
    const meanSpeed = Math.sqrt((8 * 8.31446261815324 * 150) / (Math.PI * 18.01528e-3))
    expect(impingementRate(1e-6, 150) / (molecules * meanSpeed * 0.25)).toBeCloseTo(1, 12)
  })
})
