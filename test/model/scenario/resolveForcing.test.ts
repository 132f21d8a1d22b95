import { describe, expect, it } from 'vitest'
import { resolve } from '../../../src/model/scenario/resolve.ts'

describe('waves and perturbations', () => {
  it('resolve to SI, a wave without an end going on for ever', () => {
    const { waves } = resolve({
      waves: [{ amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10, phase_deg: 90 }],
    }).scenario
    expect(waves).toEqual([
      {
        amplitude_K: 5,
        referenceAltitude_m: 85000,
        period_s: 3600,
        verticalWavelength_m: 10000,
        phase_rad: Math.PI / 2,
        start_s: 0,
        end_s: Infinity,
        rise_s: 3600,
        displacementShare: 1,
        grows: true,
        isRandomMember: false,
      },
    ])
  })

  it('spell out a perturbation', () => {
    const { perturbations } = resolve({
      perturbations: [
        { quantity: 'water', add_ppmv: 2, altitude: { from_km: 80, to_km: 84 } },
        {
          quantity: 'temperature',
          factor: 1.05,
          altitude: { centre_km: 83, width_km: 2 },
          time: { shape: 'ramp', start_h: 6, rise_h: 0.5 },
        },
      ],
    }).scenario
    expect(perturbations[0]).toEqual({
      quantity: 'water',
      mode: 'add',
      amount: 2e-6,
      altitude: { shape: 'topHat', from_m: 80000, to_m: 84000 },
      time: { shape: 'always' },
    })
    expect(perturbations[1]).toMatchObject({
      mode: 'multiply',
      amount: 1.05,
      altitude: { shape: 'gaussian', centre_m: 83000 },
      time: { shape: 'ramp', start_s: 21600, end_s: Infinity, rise_s: 1800 },
    })
  })
})
