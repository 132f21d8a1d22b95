import { describe, expect, it } from 'vitest'
import { complete } from '../../../src/model/scenario/complete.ts'
import { randomWaves } from '../../../src/model/scenario/randomWaves.ts'

function field(keys: object) {
  const { random_waves } = complete({ random_waves: keys })
  if (random_waves === undefined) throw new Error('no random waves')
  return randomWaves(random_waves)
}

describe('a random superposition of waves', () => {
  it('depends on its seed alone', () => {
    expect(field({ seed: 7 })).toEqual(field({ seed: 7 }))
    expect(field({ seed: 7 })).not.toEqual(field({ seed: 8 }))
  })

  it.each([-1, 0, 3, 10])('has the wanted variance at spectral slope %d', (spectral_slope) => {
    const waves = field({ rms_K: 4, count: 25, spectral_slope })
    const variance = waves.reduce((sum, { amplitude_K }) => sum + amplitude_K ** 2 / 2, 0)
    // Rounding of a sum of 25 terms.
    expect(variance / 16).toBeCloseTo(1, 12)
  })

  it('stays inside its spans', () => {
    const waves = field({ periods_h: [1, 2], vertical_wavelengths_km: [5, 6], count: 200 })
    expect(waves).toHaveLength(200)
    for (const { period_h, vertical_wavelength_km, phase_deg } of waves) {
      expect(period_h).toBeGreaterThanOrEqual(1)
      expect(period_h).toBeLessThanOrEqual(2)
      expect(vertical_wavelength_km).toBeGreaterThanOrEqual(5)
      expect(vertical_wavelength_km).toBeLessThanOrEqual(6)
      expect(phase_deg).toBeGreaterThanOrEqual(0)
      expect(phase_deg).toBeLessThan(360)
    }
  })

  it('gives a wave variance in proportion to m^(1 - p)', () => {
    const waves = field({ spectral_slope: 3, count: 10 })
    const constants = waves.map(
      ({ amplitude_K, vertical_wavelength_km }) => amplitude_K / vertical_wavelength_km,
    )
    for (const constant of constants) expect(constant / constants[0]).toBeCloseTo(1, 12)
  })

  it('hands the shared keys to every member', () => {
    const [wave] = field({ count: 1, displacement_share: 0.5, grows: false, at_km: 83 })
    expect(wave).toMatchObject({ displacement_share: 0.5, grows: false, at_km: 83, start_h: 0 })
  })
})
