import { describe, expect, it } from 'vitest'
import { refusal } from './refusal.ts'

const wave = { amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10 }
const change = (keys: object) => ({ perturbations: [{ quantity: 'temperature', ...keys }] })

describe('impossible waves and perturbations are refused', () => {
  it.each<[string, unknown, string]>([
    [
      'a wave that ends before it starts',
      { waves: [{ ...wave, start_h: 5, end_h: 4 }] },
      'waves.0.end_h: 4 is not allowed; allowed: after start_h 5',
    ],
    [
      'a wave too short to rise and fall',
      { waves: [{ ...wave, end_h: 3, rise_h: 2 }] },
      'waves.0.end_h: 3 is not allowed',
    ],
    [
      'a wavelength of nothing',
      { waves: [{ ...wave, vertical_wavelength_km: 0 }] },
      'waves.0.vertical_wavelength_km: 0 is not allowed; allowed: a number above 0',
    ],
    [
      'a span the wrong way round',
      { random_waves: { periods_h: [8, 1] } },
      'random_waves.periods_h: [8, 1] is not allowed; allowed: the lesser value first',
    ],
    [
      'a perturbation of nothing',
      change({}),
      'perturbations.0: needs add_K or factor, one of them',
    ],
    [
      'a perturbation in a foreign unit',
      change({ add_ppmv: 1 }),
      'perturbations.0.add_ppmv: does not fit quantity temperature; allowed: add_K or factor',
    ],
    [
      'a negative factor',
      { perturbations: [{ quantity: 'water', factor: -1 }] },
      'perturbations.0.factor: -1 is not allowed; allowed: 0 or more',
    ],
    [
      'a temperature factor of 0',
      change({ factor: 0 }),
      'perturbations.0.factor: 0 is not allowed; allowed: above 0',
    ],
    [
      'half a band',
      change({ add_K: 1, altitude: { from_km: 80, width_km: 2 } }),
      'perturbations.0.altitude: needs from_km and to_km, or centre_km and width_km',
    ],
    [
      'a band upside down',
      change({ add_K: 1, altitude: { from_km: 84, to_km: 82 } }),
      'perturbations.0.altitude.to_km: 82 is not allowed; allowed: above from_km 84',
    ],
    [
      'a pulse without end',
      change({ add_K: 1, time: { shape: 'pulse', start_h: 1 } }),
      'perturbations.0.time.end_h: is missing; a pulse needs it',
    ],
    [
      'a step with an end',
      change({ add_K: 1, time: { shape: 'step', start_h: 1, end_h: 2 } }),
      'perturbations.0.time.end_h: has no meaning for step; allowed: start_h',
    ],
    [
      'a pulse that ends first',
      change({ add_K: 1, time: { shape: 'pulse', start_h: 2, end_h: 1 } }),
      'perturbations.0.time.end_h: 1 is not allowed; allowed: after start_h 2',
    ],
  ])('%s', (_, document, message) => {
    expect(refusal(document)).toContain(message)
  })
})
