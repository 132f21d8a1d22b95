import { describe, expect, it } from 'vitest'
import { describeScenario } from '../../src/io/describeScenario.ts'
import { complete } from '../../src/model/scenario/complete.ts'
import { resolve } from '../../src/model/scenario/resolve.ts'

const wave = { amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10 }

function described(document: object): Map<string, string> {
  return new Map(describeScenario(resolve(complete(document)).scenario))
}

describe('describeScenario', () => {
  it('tells every key in SI units', () => {
    const pairs = described({ duration_h: 2, grid: { bottom_km: 78.5 } })
    expect(pairs.get('duration_s')).toBe('7200')
    expect(pairs.get('grid.bottom_m')).toBe('78500')
    expect(pairs.get('startUtc')).toBe('none')
  })

  it('tells a profile by its range, its altitudes and its knots', () => {
    const knots = [
      { altitude_km: 70, temperature_K: 220 },
      { altitude_km: 100, temperature_K: 140 },
    ]
    expect(described({ temperature: { knots } }).get('background.temperature_K')).toBe(
      '140 to 220 over 70000 to 100000 m, 2 knots',
    )
  })

  it('spells out a few waves and counts many', () => {
    expect(described({ waves: [wave] }).get('waves.0.amplitude_K')).toBe('5')
    expect(described({ waves: Array(9).fill(wave) }).get('waves')).toBe('9 of them')
  })
})
