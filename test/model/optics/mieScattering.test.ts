import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { crossSectionTable } from '../../../src/model/optics/crossSectionTable.ts'
import { iceRefractiveIndex } from '../../../src/model/optics/iceRefractiveIndex.ts'
import { mieCrossSection } from '../../../src/model/optics/mieCrossSection.ts'
import { mieEfficiencies } from '../../../src/model/optics/mieEfficiencies.ts'
import { rayleighCrossSection } from '../../../src/model/optics/rayleighCrossSection.ts'
import { mieTable } from './mieTable.ts'

const DEGREE = Math.PI / 180

describe('scattering by spheres of any size', () => {
  it('equals the 50-digit table, of which doubles keep about 14 digits', () => {
    for (const [n = 0, k = 0, x = 0, scattering = 0, absorption = 0, ...pattern] of mieTable) {
      const place = `n ${n}, k ${k}, x ${x}`
      const efficiencies = mieEfficiencies(x, { n, k })
      expect(Math.abs(efficiencies.scattering / scattering - 1), place).toBeLessThan(1e-12)
      const slack = 1e-12 * absorption
      expect(Math.abs(efficiencies.absorption - absorption), place).toBeLessThanOrEqual(slack)
      pattern.forEach((value, i) => {
        // With a wavelength of 2 pi the radius is x and the cross-section is S11.
        const found = mieCrossSection(x, 2 * Math.PI, { n, k }, 30 * i * DEGREE)
        expect(Math.abs(found / value - 1), `${place}, ${30 * i} degrees`).toBeLessThan(1e-12)
      })
    }
  })

  it('gives the four-digit cases of the technical note of Wiscombe', () => {
    // Wiscombe 1979, technical note 140, read in a public copy: n, k (his minus sign turned), x, Q_ext, Q_sca.
    const cases: [number, number, number, number, number][] = [
      [1.5, 0, 10, 2.882, 2.882],
      [1.5, 0, 100, 2.0944, 2.0944],
      [1.5, 0, 1000, 2.0139, 2.0139],
      [1.5, 0, 5000, 2.0086, 2.0086],
      [1.5, 0.1, 10, 2.4598, 1.2351],
      [1.5, 0.1, 100, 2.0898, 1.1321],
      [1.5, 0.1, 1000, 2.0197, 1.1069],
      [1.5, 0.1, 5000, 2.0068, 1.0992],
    ]
    for (const [n, k, x, extinction, scattering] of cases) {
      const found = mieEfficiencies(x, { n, k })
      const place = `n ${n}, k ${k}, x ${x}`
      // Half a unit of the last printed digit.
      expect(Math.abs(found.scattering - scattering), place).toBeLessThanOrEqual(0.5e-4)
      expect(Math.abs(found.extinction - extinction), place).toBeLessThanOrEqual(0.5e-4)
    }
  })

  it('gives the dielectric example of Bohren and Huffman 1983, Appendix A', () => {
    // Index 1.55, radius 0.525 um, wavelength 0.6328 um: Q_sca 3.10543 and Q_back 2.92534 read in public copies
    // (Q_back is 4 pi times the cross-section straight back over the geometric one); six digits printed.
    const index = { n: 1.55, k: 0 }
    const area = Math.PI * 0.525e-6 ** 2
    const { scattering } = mieEfficiencies((2 * Math.PI * 0.525) / 0.6328, index)
    const back = (4 * Math.PI * mieCrossSection(0.525e-6, 0.6328e-6, index, Math.PI)) / area
    expect(Math.abs(scattering - 3.10543)).toBeLessThan(0.5e-5)
    expect(Math.abs(back - 2.92534)).toBeLessThan(0.5e-5)
    // The ratio to straight ahead at 90 degrees is 0.0124600805151, computed independently at high precision.
    const ratio =
      mieCrossSection(0.525e-6, 0.6328e-6, index, Math.PI / 2) /
      mieCrossSection(0.525e-6, 0.6328e-6, index, 0)
    expect(ratio).toBeCloseTo(0.0124600805151, 12)
  })

  it('tends to the law of Rayleigh for small spheres, at every angle', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-4, max: 1e-2, noNaN: true }),
        fc.double({ min: 1.05, max: 1.6, noNaN: true }),
        fc.double({ min: 0, max: 0.6, noNaN: true }),
        fc.double({ min: 0, max: Math.PI, noNaN: true }),
        (x, n, k, angle_rad) => {
          const exact = mieCrossSection(x, 2 * Math.PI, { n, k }, angle_rad)
          const small = rayleighCrossSection(x, 2 * Math.PI, { n, k }, angle_rad)
          // The next term of the series is of relative order x^2 with a factor of order one.
          expect(Math.abs(exact / small - 1)).toBeLessThan(3 * x * x + 1e-10)
        },
      ),
      { seed: 9, numRuns: 300 },
    )
  })

  it('has a pattern that integrates to its total scattering', () => {
    for (const x of [0.3, 1, 4, 20]) {
      const index = { n: 1.31, k: 1e-3 }
      const steps = 4000
      let integral = 0
      for (let i = 0; i < steps; i++) {
        const angle_rad = (Math.PI * (i + 0.5)) / steps
        const ring = 2 * Math.PI * Math.sin(angle_rad) * (Math.PI / steps)
        integral += mieCrossSection(x, 2 * Math.PI, index, angle_rad) * ring
      }
      // The midpoint rule at 4000 points, on a pattern of some twenty lobes at most, is good to about 1e-5.
      const total = mieEfficiencies(x, index).scattering * Math.PI * x * x
      expect(Math.abs(integral / total - 1)).toBeLessThan(1e-5)
    }
  })

  it('scatters 0.71 of the law of Rayleigh at 50 nm, 265 nm and 90 degrees, and 0.52 at 60 nm', () => {
    // Computed independently from the same refractive index; two digits kept.
    const index = iceRefractiveIndex(265e-9)
    const share = (radius_m: number) =>
      mieCrossSection(radius_m, 265e-9, index, Math.PI / 2) /
      rayleighCrossSection(radius_m, 265e-9, index, Math.PI / 2)
    expect(Math.abs(share(50e-9) - 0.71)).toBeLessThan(0.006)
    expect(Math.abs(share(60e-9) - 0.52)).toBeLessThan(0.006)
  })

  it('gives the backscatter at 532 nm of 100 particles per cubic centimetre', () => {
    // 9.33e-10 and 4.97e-11 1/(m sr) for 50 and 30 nm, computed independently; three digits kept.
    const channel = {
      wavelength_m: 532e-9,
      refractiveIndex: iceRefractiveIndex(532e-9),
      scatteringAngle_rad: Math.PI,
    }
    const table = crossSectionTable(mieCrossSection, [50e-9, 30e-9], channel)
    expect(Math.abs((100e6 * (table[0] ?? 0)) / 9.33e-10 - 1)).toBeLessThan(1e-3)
    expect(Math.abs((100e6 * (table[1] ?? 0)) / 4.97e-11 - 1)).toBeLessThan(1e-3)
  })
})
