import { describe, expect, it } from 'vitest'
import { mieEfficiencies } from '../../../src/model/optics/mieEfficiencies.ts'
import { miePhaseFunction } from '../../../src/model/optics/miePhaseFunction.ts'

/** Integral over all directions by Fejer's second rule: exact for polynomials in cos Theta of degree below 399. */
function overDirections(f: (angle_rad: number) => number): number {
  const steps = 400
  let sum = 0
  for (let i = 1; i < steps; i++) {
    const angle_rad = (Math.PI * i) / steps
    let weight = 0
    for (let odd = 1; odd < steps; odd += 2) weight += Math.sin(odd * angle_rad) / odd
    sum += (4 / steps) * Math.sin(angle_rad) * weight * f(angle_rad)
  }
  return 2 * Math.PI * sum
}

describe('phase function of spheres', () => {
  const cases: [number, number, number][] = [
    [1e-4, 1.31, 2e-11],
    [0.02, 1.35, 2e-11],
    [0.6, 1.345, 2e-11],
    [3, 1.27, 7.5e-4],
    [20, 1.4, 0.5],
    [50, 1.31, 0],
  ]

  it('integrates to one over all directions', () => {
    for (const [x, n, k] of cases) {
      const whole = overDirections((angle_rad) => miePhaseFunction(x, { n, k }, angle_rad))
      // The rule is exact for the polynomial in cos Theta that the pattern is (degree below 160): rounding only.
      expect(Math.abs(whole - 1), `x ${x}`).toBeLessThan(1e-11)
    }
  })

  it('has the asymmetry as its mean cosine', () => {
    for (const [x, n, k] of cases) {
      const mean = overDirections(
        (angle_rad) => Math.cos(angle_rad) * miePhaseFunction(x, { n, k }, angle_rad),
      )
      expect(Math.abs(mean - mieEfficiencies(x, { n, k }).asymmetry), `x ${x}`).toBeLessThan(1e-11)
    }
  })

  it('tends to 3 (1 + cos^2 Theta)/(16 pi) for small spheres, as the square of their size', () => {
    // At 90 degrees the term of order x^2 vanishes.
    for (const angle_rad of [0, 1, 2.5, Math.PI]) {
      const limit = (3 / (16 * Math.PI)) * (1 + Math.cos(angle_rad) ** 2)
      const error = (x: number) => miePhaseFunction(x, { n: 1.31, k: 2e-11 }, angle_rad) / limit - 1
      // The next term is smaller by x^2 again: 4e-4 of the error, which bends the ratio of 4 by less than 1e-3.
      expect(Math.abs(error(0.02) / error(0.01) - 4)).toBeLessThan(4e-3)
      expect(Math.abs(error(0.01))).toBeLessThan(1e-4)
    }
  })

  it('is the tabulated pattern over the scattered light', () => {
    // S11 at 90 degrees and Q_sca for n 1.3, x 1, computed independently at 50 digits; p = S11/(pi x^2 Q_sca).
    const expected = 0.0140335552253853 / (Math.PI * 0.0774885032644134)
    const found = miePhaseFunction(1, { n: 1.3, k: 0 }, Math.PI / 2)
    expect(Math.abs(found / expected - 1)).toBeLessThan(1e-12)
  })
})
