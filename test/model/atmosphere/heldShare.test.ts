import { describe, expect, it } from 'vitest'
import { columnOf } from '../../support/column.ts'

const field = {
  seed: 7,
  count: 30,
  rms_K: 3,
  at_km: 85,
  periods_h: [0.5, 8],
  vertical_wavelengths_km: [5, 20],
}

function heldShare(document: object): Float64Array {
  return columnOf(document).atmosphere.basis(0).waves.heldShare
}

describe('holding waves', () => {
  it('leaves gentle waves as they are', () => {
    const gentle = { amplitude_K: 1, period_h: 12, vertical_wavelength_km: 40, at_km: 83 }
    expect(Math.min(...heldShare({ waves: [gentle] }))).toBe(1)
  })

  it('leaves most of an ordinary random field', () => {
    const share = heldShare({ random_waves: field })
    // Rounding apart, half a field of 3 K is what the stability of the default air can carry at its weakest.
    expect(Math.min(...share)).toBeGreaterThan(0.4)
    expect(share.reduce((sum, value) => sum + value, 0) / share.length).toBeGreaterThan(0.6)
  })

  it('is smooth: neighbouring heights differ by a few per cent', () => {
    const share = heldShare({ random_waves: field })
    const jumps = Array.from(share.slice(1), (value, i) => Math.abs(value - share[i]))
    expect(Math.max(...jumps)).toBeLessThan(0.05)
  })
})
