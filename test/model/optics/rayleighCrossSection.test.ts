import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { crossSectionTable } from '../../../src/model/optics/crossSectionTable.ts'
import { iceRefractiveIndex } from '../../../src/model/optics/iceRefractiveIndex.ts'
import { polarisability } from '../../../src/model/optics/polarisability.ts'
import { rayleighAbsorption } from '../../../src/model/optics/rayleighAbsorption.ts'
import { rayleighCrossSection } from '../../../src/model/optics/rayleighCrossSection.ts'
import { rayleighScattering } from '../../../src/model/optics/rayleighScattering.ts'

describe('scattering by small spheres', () => {
  it('is 1.117e-16 m2/sr for 50 nm of ice at 265 nm and 90 degrees', () => {
    // Computed independently from the written formula; four digits kept.
    const value = rayleighCrossSection(50e-9, 265e-9, iceRefractiveIndex(265e-9), Math.PI / 2)
    expect(Math.abs(value / 1.117e-16 - 1)).toBeLessThan(0.5e-3)
  })

  it('gives the backscatter at 532 nm of 100 particles of 50 nm per cubic centimetre', () => {
    // 9.33e-10 1/(m sr), computed independently with true spheres; at x = 0.59 backward scattering is up to a fifth
    // below Rayleigh's law, and never above it.
    const value = 100e6 * rayleighCrossSection(50e-9, 532e-9, iceRefractiveIndex(532e-9), Math.PI)
    expect(value).toBeGreaterThan(9.33e-10)
    expect(value).toBeLessThan(9.33e-10 * 1.25)
  })

  it('integrates over all directions to 8 pi/3 times k^4 r^6 |(m^2 - 1)/(m^2 + 2)|^2', () => {
    const index = { n: 1.4, k: 0.5 }
    const steps = 2000
    let integral = 0
    for (let i = 0; i < steps; i++) {
      const angle_rad = (Math.PI * (i + 0.5)) / steps
      integral +=
        rayleighCrossSection(40e-9, 3e-6, index, angle_rad) *
        2 *
        Math.PI *
        Math.sin(angle_rad) *
        (Math.PI / steps)
    }
    // The midpoint rule is off by a few times (pi/2000)^2/24 = 1e-7.
    expect(integral / rayleighScattering(40e-9, 3e-6, index)).toBeCloseTo(1, 6)
    const { re, im } = polarisability(index)
    const factor = ((2 * Math.PI) / 3e-6) ** 4 * 40e-9 ** 6 * (re * re + im * im)
    expect(integral / factor).toBeCloseTo((8 * Math.PI) / 3, 5)
  })

  it('agrees with exact small spheres, scattering and absorbing', () => {
    // Size parameter 0.001, refractive index 1.3: Q_sca 9.3242549e-14 from Lorenz-Mie at 50 digits; the next term of
    // the series is of relative order x^2 = 1e-6.
    const wavelength_m = 2 * Math.PI
    const efficiency = rayleighScattering(0.001, wavelength_m, { n: 1.3, k: 0 }) / (Math.PI * 1e-6)
    expect(Math.abs(efficiency / 9.3242549041775e-14 - 1)).toBeLessThan(3e-6)
    // Q_sca and Q_abs at size parameter 0.001, from Lorenz-Mie at 50 digits.
    const absorbers: [number, number, number, number][] = [
      [1.27, 7.5e-4, 7.67431197178861e-14, 1.75131590981593e-6],
      [1.0259, 0.35, 1.52553685964151e-13, 9.46938917308975e-4],
      [1.4, 0.5, 4.17889340206385e-13, 1.06842419715618e-3],
    ]
    for (const [n, k, scattering, absorption] of absorbers) {
      const area = Math.PI * 1e-6
      const scattered = rayleighScattering(0.001, wavelength_m, { n, k }) / area
      const absorbed = rayleighAbsorption(0.001, wavelength_m, { n, k }) / area
      expect(Math.abs(scattered / scattering - 1)).toBeLessThan(3e-6)
      expect(Math.abs(absorbed / absorption - 1)).toBeLessThan(3e-6)
    }
  })

  it('scales as the sixth power of radius over the fourth of wavelength', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-9, max: 1e-7, noNaN: true }),
        fc.double({ min: 2e-7, max: 1e-5, noNaN: true }),
        fc.double({ min: 0, max: Math.PI, noNaN: true }),
        (radius_m, wavelength_m, angle_rad) => {
          const index = { n: 1.31, k: 1e-3 }
          const base = rayleighCrossSection(radius_m, wavelength_m, index, angle_rad)
          const larger = rayleighCrossSection(2 * radius_m, wavelength_m, index, angle_rad)
          const longer = rayleighCrossSection(radius_m, 2 * wavelength_m, index, angle_rad)
          expect(larger / base).toBeCloseTo(64, 9)
          expect(longer / base).toBeCloseTo(1 / 16, 12)
          const mirrored = rayleighCrossSection(radius_m, wavelength_m, index, Math.PI - angle_rad)
          expect(mirrored / base).toBeCloseTo(1, 12)
        },
      ),
      { seed: 8 },
    )
  })

  it('absorbs nothing where k is zero', () => {
    expect(rayleighAbsorption(50e-9, 265e-9, { n: 1.35, k: 0 })).toBe(0)
  })
})

describe('table of cross-sections', () => {
  it('holds one value per class, in order, from the given law', () => {
    const radii_m = [10e-9, 20e-9, 70e-9]
    const channel = {
      wavelength_m: 532e-9,
      refractiveIndex: { n: 1.31164, k: 1.48e-9 },
      scatteringAngle_rad: Math.PI,
    }
    const table = crossSectionTable(rayleighCrossSection, radii_m, channel)
    expect(table).toHaveLength(3)
    expect((table[1] ?? 0) / (table[0] ?? 0)).toBeCloseTo(64, 10)
    expect((table[2] ?? 0) / (table[0] ?? 0)).toBeCloseTo(7 ** 6, 5)
  })

  it('passes radius, wavelength, refractive index and angle to the law as given', () => {
    const index = { n: 2, k: 3 }
    const channel = { wavelength_m: 5, refractiveIndex: index, scatteringAngle_rad: 7 }
    const table = crossSectionTable(
      (radius_m, wavelength_m, { n, k }, angle_rad) =>
        radius_m + 10 * wavelength_m + 100 * n + 1000 * k + 10000 * angle_rad,
      Float64Array.of(1, 2),
      channel,
    )
    expect([...table]).toEqual([73251, 73252])
  })
})
