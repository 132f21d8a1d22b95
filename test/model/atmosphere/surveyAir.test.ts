import { describe, expect, it } from 'vitest'
import { ModelError } from '../../../src/model/errors.ts'
import { centrePoint } from '../../../src/model/grid.ts'
import { columnOf, finalState } from '../../support/column.ts'

const small = { grid: { levels: 20 }, sizes: { classes: 12 }, duration_h: 2 }

describe('the air looked through before a run', () => {
  it('is refused where a perturbation leaves no temperature', () => {
    const perturbations = [{ quantity: 'temperature', add_K: -140 }]
    expect(() => columnOf({ ...small, perturbations })).toThrow(
      /^waves and perturbations make the temperature -\d+\.?\d* K at 0.00 h and 8\d\.\d km; allowed: above 0$/,
    )
  })

  it('is refused where a perturbation makes mixing negative, at the time it begins', () => {
    const time = { shape: 'step', start_h: 1 }
    const perturbations = [{ quantity: 'mixing', add_m2_per_s: -30, time }]
    expect(() => columnOf({ ...small, perturbations })).toThrow(
      /eddy diffusivity -\d+\.?\d* m2\/s at 1.00 h and .*; allowed: 0 or more$/,
    )
  })

  it('is refused where a perturbation takes more water than the background has', () => {
    const perturbations = [{ quantity: 'water', add_ppmv: -3 }]
    expect(() => columnOf({ ...small, perturbations })).toThrow(
      /background water -.* ppmv at 0.00 h/,
    )
  })

  it('tells the least thickness of a layer in the whole run', () => {
    const wave = { amplitude_K: 2, period_h: 1, vertical_wavelength_km: 10, at_km: 83 }
    const { survey } = columnOf({ ...small, waves: [wave] })
    expect(survey.smallestStretching).toBeLessThan(0.9)
    expect(survey.smallestStretching).toBeGreaterThan(0.3)
    expect(columnOf(small).survey.smallestStretching).toBe(1)
  })
})

describe('a step that takes away more than there is', () => {
  it('ends the run with time, altitude and quantity', () => {
    // The vapour at the top sinks below its background by photolysis, so that the background alone is not refused.
    const time = { shape: 'step', start_h: 1 }
    const at = { from_km: 94.5, to_km: 96 }
    const column = columnOf({
      ...small,
      photolysis: {
        knots: [
          { altitude_km: 77, lifetime_d: 100 },
          { altitude_km: 96, lifetime_d: 0.01 },
        ],
      },
      perturbations: [{ quantity: 'water', add_ppmv: -0.5, altitude: at, time }],
    })
    expect(() => finalState(column)).toThrow(ModelError)
    expect(() => finalState(column)).toThrow('a perturbation takes away more water than there is')
  })
})

describe('waves held below folding', () => {
  it('keep every layer above three tenths of its thickness, steep background and all', () => {
    const waves = [
      { amplitude_K: 10, period_h: 6, vertical_wavelength_km: 20, at_km: 83, start_h: -10 },
      {
        amplitude_K: 20,
        period_h: 9,
        vertical_wavelength_km: 50,
        at_km: 83,
        start_h: -10,
        grows: false,
      },
    ]
    for (const wave of waves) {
      const { survey } = columnOf({ grid: { levels: 128 }, duration_h: 24, waves: [wave] })
      expect(survey.smallestStretching).toBeGreaterThan(0.3 - 1e-2)
    }
  })

  it('have the amplitude that their growth gives, wherever the reference altitude lies', () => {
    const wave = {
      amplitude_K: 0.1,
      period_h: 12,
      vertical_wavelength_km: 30,
      displacement_share: 0,
      start_h: -100,
    }
    const amplitudeAt85 = (at_km: number) => {
      const column = columnOf({ grid: { levels: 40 }, waves: [{ ...wave, at_km }] })
      const basis = column.atmosphere.basis(0)
      const level = column.grid.centres_m.findIndex((z) => z > 85e3)
      const at = (time_s: number) =>
        column.atmosphere.read(basis, time_s, { from_s: 0, to_s: 86400 }).temperature_K[
          centrePoint(level)
        ]
      const course = Array.from({ length: 200 }, (_, i) => at((i / 200) * 12 * 3600))
      return (Math.max(...course) - Math.min(...course)) / 2
    }
    // From 76 to 80 km the amplitude grows by sqrt(p(76)/p(80)): about 4 km over two scale heights of 5 km.
    const growth = amplitudeAt85(76) / amplitudeAt85(80)
    expect(growth).toBeGreaterThan(1.4)
    expect(growth).toBeLessThan(1.6)
  })
})
