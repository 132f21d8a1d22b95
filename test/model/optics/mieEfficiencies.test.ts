import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { mieAmplitudes } from '../../../src/model/optics/mieAmplitudes.ts'
import { mieCoefficients } from '../../../src/model/optics/mieCoefficients.ts'
import { mieCrossSection } from '../../../src/model/optics/mieCrossSection.ts'
import { mieEfficiencies } from '../../../src/model/optics/mieEfficiencies.ts'
import { polarisability } from '../../../src/model/optics/polarisability.ts'
import { mieEfficiencyTable, mieExtremeTable } from './mieEfficiencyTable.ts'

describe('efficiencies of spheres', () => {
  it('equal the high-precision tables from size parameter 1e-4 to 50, down to k = 2e-11', () => {
    for (const row of [...mieEfficiencyTable, ...mieExtremeTable]) {
      const [n, k, x, scattering, absorption, backscatter, asymmetry] = row
      const found = mieEfficiencies(x, { n, k })
      const place = `n ${n}, k ${k}, x ${x}`
      // Doubles keep about 14 digits; the alternating sum straight back loses one more.
      expect(Math.abs(found.scattering / scattering - 1), place).toBeLessThan(1e-13)
      expect(Math.abs(found.backscatter / backscatter - 1), place).toBeLessThan(1e-12)
      const slack = 1e-13 * absorption
      expect(Math.abs(found.absorption - absorption), place).toBeLessThanOrEqual(slack)
      expect(Math.abs(found.asymmetry / asymmetry - 1), place).toBeLessThan(1e-13)
    }
  })

  it('lose no absorption to cancellation where the series of small spheres holds', () => {
    // Q_abs = 4 x Im{L + (x^2/15) L^2 (m^4 + 27 m^2 + 38)/(2 m^2 + 3)}, L = (m^2 - 1)/(m^2 + 2), without scattering
    // (Bohren and Huffman 1983, chapter 5, from memory). Linear in k for k = 2e-11, so that the imaginary part is 2 n k
    // times the derivative by m^2, written out below; what is left out is of order x^4 with a factor of order one.
    const index = { n: 1.35, k: 2e-11 }
    const square = index.n * index.n
    const ratio = (square - 1) / (square + 2)
    const ratioSlope = 3 / (square + 2) ** 2
    const top = square * square + 27 * square + 38
    const bottom = 2 * square + 3
    const nextSlope =
      (2 * ratio * ratioSlope * top) / bottom +
      (ratio * ratio * ((2 * square + 27) * bottom - 2 * top)) / (bottom * bottom)
    const imaginary = 2 * index.n * index.k
    expect(Math.abs((imaginary * ratioSlope) / polarisability(index).im - 1)).toBeLessThan(1e-14)
    for (const x of [1e-4, 2e-4, 5e-4, 1e-3, 2e-3, 5e-3, 0.01, 0.015, 0.02]) {
      const series = 4 * x * imaginary * (ratioSlope + ((x * x) / 15) * nextSlope)
      const found = mieEfficiencies(x, index).absorption
      expect(Math.abs(found / series - 1), `x ${x}`).toBeLessThan(x ** 4 + 1e-13)
    }
  })

  it('absorb in proportion to a vanishing k, at every size', () => {
    fc.assert(
      fc.property(
        fc.double({ min: Math.log(1e-4), max: Math.log(50), noNaN: true }),
        fc.double({ min: 1.05, max: 1.5, noNaN: true }),
        (logarithm, n) => {
          const x = Math.exp(logarithm)
          const faint = mieEfficiencies(x, { n, k: 1e-16 }).absorption
          const fainter = mieEfficiencies(x, { n, k: 1e-17 }).absorption
          // A resonance of width w bends the line by k/w; these draws meet none narrower than 1e-9.
          expect(Math.abs(faint / fainter / 10 - 1)).toBeLessThan(1e-6)
        },
      ),
      { seed: 21, numRuns: 200 },
    )
  })

  it('make extinction of scattering and absorption, and equal to the light missing straight ahead', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.05, max: 50, noNaN: true }),
        fc.double({ min: 1.05, max: 1.7, noNaN: true }),
        fc.double({ min: 0, max: 0.7, noNaN: true }),
        (x, n, k) => {
          const found = mieEfficiencies(x, { n, k })
          expect(found.extinction).toBe(found.scattering + found.absorption)
          expect(found.absorption).toBeGreaterThanOrEqual(0)
          // Optical theorem: Q_ext = (4/x^2) Re S(0). Its sum cancels at small x without absorption, to x^3 at worst.
          const ahead = (4 / (x * x)) * mieAmplitudes(mieCoefficients(x, { n, k }), 0).s1Re
          expect(Math.abs(found.extinction / ahead - 1)).toBeLessThan(1e-11)
          expect(Math.abs(found.asymmetry)).toBeLessThan(1)
        },
      ),
      { seed: 22, numRuns: 200 },
    )
  })

  it('count backscatter as 4 pi times the differential cross-section straight back', () => {
    for (const x of [1e-3, 0.1, 1, 7, 50]) {
      const index = { n: 1.31, k: 1e-3 }
      const back = mieCrossSection(x, 2 * Math.PI, index, Math.PI)
      const expected = (4 * back) / (x * x)
      // Two sums of up to seventy alternating terms, each rounded.
      expect(Math.abs(mieEfficiencies(x, index).backscatter / expected - 1)).toBeLessThan(1e-11)
    }
  })

  it('give the asymmetry and the remaining efficiencies that Wiscombe prints', () => {
    // Wiscombe 1979, technical note 140, and the author's printed test output, read in a public copy: case, n, k (his
    // minus sign turned), x, Q_ext, Q_sca, g. Cases 1 to 4 are perfect conductors. Six decimals printed.
    const cases: [number, number, number, number, number, number, number][] = [
      [5, 0.75, 0, 0.099, 0.000007, 0.000007, 0.001448],
      [6, 0.75, 0, 0.101, 0.000008, 0.000008, 0.001507],
      [7, 0.75, 0, 10, 2.232265, 2.232265, 0.896473],
      [8, 0.75, 0, 1000, 1.997908, 1.997908, 0.844944],
      [9, 1.33, 1e-5, 1, 0.093952, 0.093923, 0.184517],
      [10, 1.33, 1e-5, 100, 2.101321, 2.096594, 0.868959],
      [11, 1.33, 1e-5, 10000, 2.004089, 1.723857, 0.90784],
      [12, 1.5, 1, 0.055, 0.101491, 0.000011, 0.000491],
      [13, 1.5, 1, 0.056, 0.103347, 0.000012, 0.000509],
      [14, 1.5, 1, 1, 2.336321, 0.663454, 0.192136],
      [15, 1.5, 1, 100, 2.097502, 1.283697, 0.850252],
      [17, 10, 10, 1, 2.532993, 2.049405, -0.110664],
      [18, 10, 10, 100, 2.071124, 1.836785, 0.556215],
    ]
    for (const [number, n, k, x, extinction, scattering, asymmetry] of cases) {
      const found = mieEfficiencies(x, { n, k })
      // Half a unit of the last printed digit, and a hair for the doubles.
      const half = 0.51e-6
      expect(Math.abs(found.extinction - extinction), `case ${number}`).toBeLessThan(half)
      expect(Math.abs(found.scattering - scattering), `case ${number}`).toBeLessThan(half)
      expect(Math.abs(found.asymmetry - asymmetry), `case ${number}`).toBeLessThan(half)
    }
  })

  it('give the absorbing variant of the example of Bohren and Huffman 1983, Appendix A', () => {
    // Index 1.55 + 0.1 i, radius 0.525 um, wavelength 0.6328 um: read in a public test suite, eleven decimals.
    const found = mieEfficiencies((2 * Math.PI * 0.525) / 0.6328, { n: 1.55, k: 0.1 })
    expect(Math.abs(found.extinction - 2.86165188243)).toBeLessThan(0.6e-11)
    expect(Math.abs(found.scattering - 1.66424911991)).toBeLessThan(0.6e-11)
    expect(Math.abs(found.backscatter - 0.2059953408)).toBeLessThan(2e-11)
    expect(Math.abs(found.asymmetry - 0.80128972639)).toBeLessThan(0.6e-11)
  })

  it('approach the law of Rayleigh as the square of the size parameter', () => {
    for (const index of [
      { n: 1.31, k: 2e-11 },
      { n: 1.4, k: 0.5 },
    ]) {
      const { re, im } = polarisability(index)
      const error = (x: number) => {
        const { scattering, absorption } = mieEfficiencies(x, index)
        const limit = (8 / 3) * x ** 4 * (re * re + im * im)
        return [Math.abs(scattering / limit - 1), Math.abs(absorption / (4 * x * im) - 1)]
      }
      const [coarse = [], middle = [], fine = []] = [0.01, 0.005, 0.0025].map(error)
      for (const part of [0, 1]) {
        const first = Math.log2((coarse[part] ?? 0) / (middle[part] ?? 0))
        const second = Math.log2((middle[part] ?? 0) / (fine[part] ?? 0))
        // The next term bends the slope by a few x where the sphere absorbs, by x^2 where it does not.
        expect(Math.abs(first - 2)).toBeLessThan(0.08)
        expect(Math.abs(second - 2)).toBeLessThan(0.04)
      }
    }
  })
})
