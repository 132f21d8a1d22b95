import { describe, expect, it } from 'vitest'
import { resolve } from '../../../src/model/scenario/resolve.ts'

const wave = { amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10 }
const change = (keys: object) => ({ perturbations: [{ quantity: 'temperature', ...keys }] })
const measured = {
  time_h: [0, 1],
  altitude_km: [80, 90],
  temperature_K: [
    [1, 2],
    [3, 4],
  ],
}

describe('what lies outside a measured range is allowed with a warning', () => {
  it.each<[string, unknown, string]>([
    [
      'a temperature too low for the formula',
      { temperature: { offset_K: -25 } },
      'temperature: 104 K is outside 110 to 273.16 K, the range of ice.saturation murphy_koop_2005',
    ],
    [
      'a formula measured in warmer air',
      { ice: { saturation: 'marti_mauersberger_1993' } },
      'temperature: 129 K is outside 170 to 250 K',
    ],
    [
      'a measured table too cold',
      {
        temperature: {
          measured: {
            ...measured,
            temperature_K: [
              [150, 100],
              [150, 120],
            ],
          },
        },
      },
      'temperature: 100 K is outside',
    ],
    [
      'a contact parameter never measured',
      { nucleation: { contact_parameter: 0.6 } },
      'nucleation.contact_parameter: 0.6 is outside 0.84 to 0.98, the range measured on dusts',
    ],
    ['an odd density', { ice: { density: 800 } }, 'ice.density: 800 kg/m3 is outside 916 to 934'],
    ['an odd drag', { ice: { drag_delta: 2 } }, 'ice.drag_delta: 2 is outside 1 to 1.45'],
    [
      'a wave faster than the air can swing',
      { waves: [{ ...wave, period_h: 0.05 }] },
      'waves.0.period_h: 0.05 h is below the buoyancy period',
    ],
    [
      'a wave after the end',
      { waves: [{ ...wave, start_h: 30 }] },
      'waves.0: starts at 30 h, after the end of the run',
    ],
    [
      'a perturbation after the end',
      change({ add_K: 1, time: { shape: 'step', start_h: 24 } }),
      'perturbations.0: starts at 24 h',
    ],
    [
      'a grid into warmer air',
      { grid: { top_km: 106 }, ...everything(50, 110) },
      'grid: 77 to 106 km reaches outside 60 to 105 km',
    ],
    [
      'a ceiling too slow for fine classes',
      { sizes: { classes: 192 } },
      'numerics.sublimation_ceiling_s: 60 s for one of 192 classes may hold back sublimation; 30 s or less is tested',
    ],
  ])('%s', (_, document, warning) => {
    const { warnings } = resolve(document)
    expect(warnings).toHaveLength(1)
    expect(warnings[0]).toContain(warning)
  })
})

function everything(bottom: number, top: number) {
  const flat = (key: string, value: number) => ({
    table: { altitude_km: [bottom, top], [key]: [value, value] },
  })
  return {
    temperature: flat('temperature_K', 150),
    water: flat('water_ppmv', 3),
    wind: flat('wind_cm_per_s', 2),
    mixing: flat('mixing_m2_per_s', 30),
    nuclei: flat('nuclei_per_cm3', 1000),
    photolysis: flat('lifetime_d', 10),
  }
}
