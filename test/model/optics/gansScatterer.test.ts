import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { InputError } from '../../../src/model/errors.ts'
import { depolarisationFactors } from '../../../src/model/optics/depolarisationFactors.ts'
import { gansCrossSections } from '../../../src/model/optics/gansCrossSections.ts'
import { gansScatterer } from '../../../src/model/optics/gansScatterer.ts'
import { rayleighAbsorption } from '../../../src/model/optics/rayleighAbsorption.ts'
import { rayleighCrossSection } from '../../../src/model/optics/rayleighCrossSection.ts'
import { rayleighScattering } from '../../../src/model/optics/rayleighScattering.ts'

const axisRatios = fc
  .double({ min: Math.log(0.01), max: Math.log(100), noNaN: true })
  .map((logarithm) => Math.exp(logarithm))
const radius_m = 40e-9
const wavelength_m = 3.1e-6

describe('depolarisation factors of spheroids', () => {
  it('equal the integral that defines them', () => {
    fc.assert(
      fc.property(axisRatios.map(Math.sqrt), (q) => {
        // L = (q/2) int_0^inf ds/[(s + q^2)^(3/2) (s + 1)], with w = q/sqrt(s + q^2): int_0^1 w^2 dw/[q^2 + (1 - q^2) w^2].
        const integrand = (w: number) => (w * w) / (q * q + (1 - q * q) * w * w)
        const steps = 20000
        let sum = integrand(0) + integrand(1)
        for (let i = 1; i < steps; i++) sum += (i % 2 === 1 ? 4 : 2) * integrand(i / steps)
        // Ratios from 0.1 to 10: the integrand bends over 1/200 of the range at least, which is a hundred steps of
        // Simpson's rule, whose error falls with their fourth power.
        expect(Math.abs(depolarisationFactors(q).along - sum / (3 * steps))).toBeLessThan(1e-10)
      }),
      { seed: 31, numRuns: 60 },
    )
  })

  it('are 1/3 for a sphere, 0 and 1/2 for a needle, 1 and 0 for a plate', () => {
    expect(depolarisationFactors(1).along).toBeCloseTo(1 / 3, 15)
    expect(depolarisationFactors(1).across).toBeCloseTo(1 / 3, 15)
    // Needle: ln(2 q)/q^2 is left; plate: pi q/2.
    expect(depolarisationFactors(1e4).along).toBeLessThan(1e-7)
    expect(depolarisationFactors(1e4).across).toBeCloseTo(0.5, 6)
    expect(depolarisationFactors(1e-4).along).toBeCloseTo(1 - (Math.PI / 2) * 1e-4, 7)
  })

  it('are 0.1736 and 0.5272 along the axis for ratios 2 and 1/2', () => {
    // Textbook values of demagnetising factors, from memory; four digits.
    expect(Math.abs(depolarisationFactors(2).along - 0.1736)).toBeLessThan(0.5e-4)
    expect(Math.abs(depolarisationFactors(0.5).along - 0.5272)).toBeLessThan(0.5e-4)
  })

  it('pass smoothly from the series near the sphere to the closed forms', () => {
    // 1 - 1/q^2 = 0.02 and -0.02 are the seams; across 2e-9 of q the factor moves by 5e-10.
    for (const seam of [Math.sqrt(1 / 0.98), Math.sqrt(1 / 1.02)]) {
      const before = depolarisationFactors(seam * (1 - 1e-9)).along
      const after = depolarisationFactors(seam * (1 + 1e-9)).along
      // The slope dL/dq is -4/15 at the sphere; the closed forms lose two digits there.
      expect(Math.abs((before - after) / 2e-9 - 4 / 15)).toBeLessThan(0.02)
    }
  })
})

describe('scattering by small spheroids in random orientation', () => {
  it('is the law of Rayleigh for a sphere', () => {
    for (const index of [
      { n: 1.31, k: 2e-11 },
      { n: 1.4, k: 0.5 },
    ]) {
      for (const angle_rad of [0, 0.7, Math.PI / 2, Math.PI]) {
        const found = gansScatterer(1)(radius_m, wavelength_m, index, angle_rad)
        const sphere = rayleighCrossSection(radius_m, wavelength_m, index, angle_rad)
        expect(found / sphere).toBeCloseTo(1, 13)
      }
      const found = gansCrossSections(radius_m, wavelength_m, index, 1)
      expect(found.scattering / rayleighScattering(radius_m, wavelength_m, index)).toBeCloseTo(
        1,
        13,
      )
      expect(found.absorption / rayleighAbsorption(radius_m, wavelength_m, index)).toBeCloseTo(
        1,
        13,
      )
    }
  })

  it('integrates over all directions to its total scattering', () => {
    fc.assert(
      fc.property(axisRatios, fc.double({ min: 0, max: 1, noNaN: true }), (axisRatio, k) => {
        const index = { n: 1.4, k }
        const law = gansScatterer(axisRatio)
        const at = (cosine: number) => law(radius_m, wavelength_m, index, Math.acos(cosine))
        // Simpson's rule on three points is exact for the square in cos Theta that the pattern is.
        const integral = ((2 * Math.PI) / 3) * (at(-1) + 4 * at(0) + at(1))
        const found = gansCrossSections(radius_m, wavelength_m, index, axisRatio)
        expect(integral / found.scattering).toBeCloseTo(1, 12)
        expect(found.extinction).toBe(found.scattering + found.absorption)
      }),
      { seed: 32 },
    )
  })

  it('equals the mean over orientations of one dipole per axis', () => {
    // Independent: the particle is turned through a grid of orientations and the far field of its dipole is squared for
    // both polarisations of the incident light.
    const index = { n: 1.31, k: 0 }
    for (const axisRatio of [0.2, 3]) {
      for (const angle_rad of [0.4, Math.PI / 2, Math.PI]) {
        const mean = meanOverOrientations(index.n, axisRatio, angle_rad)
        const found = gansScatterer(axisRatio)(1e-8, 2 * Math.PI, index, angle_rad)
        // Simpson's rule in cos and even steps in azimuth are exact for the quartic polynomial: rounding only.
        expect(found / (mean * 1e-48)).toBeCloseTo(1, 10)
      }
    }
  })

  it('is stronger than by the sphere of equal volume, for plates and for needles', () => {
    fc.assert(
      fc.property(
        axisRatios.filter((ratio) => Math.abs(Math.log(ratio)) > 0.05),
        (axisRatio) => {
          const index = { n: 1.31, k: 1e-6 }
          const found = gansCrossSections(radius_m, wavelength_m, index, axisRatio)
          expect(found.scattering).toBeGreaterThan(
            rayleighScattering(radius_m, wavelength_m, index),
          )
          expect(found.absorption).toBeGreaterThan(
            rayleighAbsorption(radius_m, wavelength_m, index),
          )
        },
      ),
      { seed: 33 },
    )
  })

  it('has the plate and the needle as limits', () => {
    // With L = 1, 0, 0 the polarisabilities are (m^2 - 1)/(3 m^2) once and (m^2 - 1)/3 twice; with L = 0, 1/2, 1/2 they
    // are (m^2 - 1)/3 once and (2/3)(m^2 - 1)/(m^2 + 1) twice.
    const square = 1.31 * 1.31
    const total = (first: number, second: number) =>
      ((8 * Math.PI) / 9) * (first ** 2 + 2 * second ** 2) * radius_m ** 6
    const index = { n: 1.31, k: 0 }
    const plate = gansCrossSections(radius_m, 2 * Math.PI, index, 1e-6).scattering
    const needle = gansCrossSections(radius_m, 2 * Math.PI, index, 1e6).scattering
    // What is left of the factors is 1.6e-6 for the plate and 1e-11 for the needle.
    expect(plate / total((square - 1) / (3 * square), (square - 1) / 3)).toBeCloseTo(1, 5)
    const round = ((2 / 3) * (square - 1)) / (square + 1)
    expect(needle / total((square - 1) / 3, round)).toBeCloseTo(1, 9)
  })

  it('refuses an axis ratio that no spheroid has', () => {
    for (const axisRatio of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(() => gansScatterer(axisRatio)).toThrow(InputError)
      expect(() => gansScatterer(axisRatio)).toThrow(/axis ratio .* above 0/)
    }
  })
})

/** d sigma/d Omega / (k^4 r^6) of a transparent spheroid by explicit turning; light along z, seen in the x-z plane. */
function meanOverOrientations(n: number, axisRatio: number, angle_rad: number): number {
  const { along, across } = depolarisationFactors(axisRatio)
  const susceptibility = n * n - 1
  const parallel = susceptibility / (3 * (1 + along * susceptibility))
  const crosswise = susceptibility / (3 * (1 + across * susceptibility))
  const inPlane = [Math.cos(angle_rad), 0, -Math.sin(angle_rad)]
  const rings = 2000
  const azimuths = 12
  let sum = 0
  for (let i = 0; i <= rings; i++) {
    const ringWeight = (i === 0 || i === rings ? 1 : i % 2 === 1 ? 4 : 2) / (3 * rings)
    const cosine = -1 + (2 * i) / rings
    const sine = Math.sqrt(Math.max(0, 1 - cosine * cosine))
    for (let j = 0; j < azimuths; j++) {
      const azimuth = (2 * Math.PI * j) / azimuths
      const axis = [sine * Math.cos(azimuth), sine * Math.sin(azimuth), cosine]
      for (const incident of [0, 1]) {
        const dipole = [0, 1, 2].map(
          (component) =>
            (component === incident ? crosswise : 0) +
            (parallel - crosswise) * (axis[incident] ?? 0) * (axis[component] ?? 0),
        )
        const planar = dipole.reduce((total, part, c) => total + part * (inPlane[c] ?? 0), 0)
        sum += ((ringWeight / azimuths) * ((dipole[1] ?? 0) ** 2 + planar ** 2)) / 2
      }
    }
  }
  return sum
}
