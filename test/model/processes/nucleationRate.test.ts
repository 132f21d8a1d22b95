import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { activationRate } from '../../../src/model/processes/activationRate.ts'
import { criticalRadius } from '../../../src/model/processes/criticalRadius.ts'
import {
  type NucleationConditions,
  nucleationRate,
} from '../../../src/model/processes/nucleationRate.ts'

/** Energies, frequency and jump from memory; contact parameter 0.95 as commonly set, Iraci et al. 2010, Icarus. */
const parameters = {
  contactParameter: 0.95,
  desorptionEnergy_J: 2.9e-20,
  surfaceDiffusionEnergy_J: 2.9e-21,
  vibrationFrequency_per_s: 1e13,
  jumpDistance_m: 0.32e-9,
}

/** ln J from the logarithms of its factors, with every quantity rebuilt from constants of the SI and the molar mass. */
function logarithmOfRate(c: NucleationConditions): number {
  const kT = 1.380649e-23 * c.temperature_K
  const mass = 18.01528e-3 / 6.02214076e23
  const volume = mass / c.density
  const sigma = 0.141 - 1.5e-4 * c.temperature_K
  const p = c.parameters
  const lnBeta = Math.log(c.vapourPressure_Pa) - 0.5 * Math.log(2 * Math.PI * mass * kT)
  const lnAdsorbed = lnBeta - Math.log(p.vibrationFrequency_per_s) + p.desorptionEnergy_J / kT
  const lnGerm = Math.log(2 * sigma * volume) - Math.log(kT * Math.log(c.saturationRatio))
  const x = c.nucleusRadius_m / Math.exp(lnGerm)
  const m = p.contactParameter
  const phi = Math.sqrt(1 - 2 * m * x + x * x)
  const u = (x - m) / phi
  const shape =
    0.5 * (1 + ((1 - m * x) / phi) ** 3 + x ** 3 * (2 - 3 * u + u ** 3) + 3 * m * x * x * (u - 1))
  const lnBarrier =
    Math.log((16 * Math.PI) / 3) +
    3 * Math.log(sigma) +
    2 * Math.log(volume) -
    2 * Math.log(kT * Math.log(c.saturationRatio)) +
    Math.log(shape) -
    Math.log(kT)
  const lnMolecules = Math.log((4 * Math.PI) / 3) + 3 * lnGerm - Math.log(volume)
  const lnZeldovich = 0.5 * (lnBarrier - Math.log(3 * Math.PI)) - lnMolecules
  const lnDiffusion =
    Math.log(2 * Math.PI * p.vibrationFrequency_per_s * p.jumpDistance_m) +
    lnGerm +
    lnAdsorbed -
    p.surfaceDiffusionEnergy_J / kT
  const lnDirect = Math.log(Math.PI) + 2 * lnGerm + lnBeta
  const lnSupply = lnDiffusion + Math.log1p(Math.exp(lnDirect - lnDiffusion))
  const lnArea = Math.log(4 * Math.PI) + 2 * Math.log(c.nucleusRadius_m)
  return lnArea + lnZeldovich + lnAdsorbed + lnSupply - Math.exp(lnBarrier)
}

/** Saturated pressure from the power of ten of Marti and Mauersberger 1993; any pressure would serve. */
const conditionsAt = (radius_nm: number, temperature_K: number, saturationRatio: number) => ({
  nucleusRadius_m: radius_nm * 1e-9,
  temperature_K,
  vapourPressure_Pa: saturationRatio * 10 ** (-2663.5 / temperature_K + 12.537),
  saturationRatio,
  density: 932,
  parameters,
})

describe('classical nucleation on one nucleus', () => {
  it('equals the written formula evaluated through logarithms', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.5, max: 10, noNaN: true }),
        fc.double({ min: 115, max: 165, noNaN: true }),
        fc.double({ min: 1.5, max: 500, noNaN: true }),
        (radius_nm, temperature_K, saturationRatio) => {
          const conditions = conditionsAt(radius_nm, temperature_K, saturationRatio)
          const expected = logarithmOfRate(conditions)
          // Below exp(-600) the rate itself nears the smallest double.
          fc.pre(expected > -600)
          // The printed form of the geometric factor loses up to four digits, times a barrier of hundreds.
          expect(Math.abs(Math.log(nucleationRate(conditions)) - expected)).toBeLessThan(1e-8)
        },
      ),
      { seed: 4, numRuns: 500 },
    )
  })

  it('does not happen without supersaturation', () => {
    expect(nucleationRate(conditionsAt(1.5, 140, 1))).toBe(0)
    expect(nucleationRate(conditionsAt(1.5, 140, 0.4))).toBe(0)
  })

  it('tends to zero, not to a number that is not one, as supersaturation vanishes', () => {
    expect(nucleationRate(conditionsAt(1.5, 140, 1 + 1e-12))).toBe(0)
  })

  it('is faster with more supersaturation, on larger nuclei and with better wetting', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.5, max: 5, noNaN: true }),
        fc.double({ min: 120, max: 155, noNaN: true }),
        fc.double({ min: 5, max: 200, noNaN: true }),
        (radius_nm, temperature_K, saturationRatio) => {
          const base = conditionsAt(radius_nm, temperature_K, saturationRatio)
          const rate = nucleationRate(base)
          fc.pre(rate > 0)
          const wetter = conditionsAt(radius_nm, temperature_K, saturationRatio * 1.2)
          const larger = conditionsAt(radius_nm * 1.2, temperature_K, saturationRatio)
          expect(nucleationRate(wetter)).toBeGreaterThan(rate)
          expect(nucleationRate(larger)).toBeGreaterThan(rate)
        },
      ),
      { seed: 5 },
    )
    const at = (contactParameter: number) =>
      nucleationRate({
        ...conditionsAt(1.2, 140, 20),
        parameters: { ...parameters, contactParameter },
      })
    expect(at(0.95)).toBeGreaterThan(at(0.9))
    expect(at(0.9)).toBeGreaterThan(at(0.84))
  })
})

describe('barrierless activation', () => {
  const at = (nucleusRadius_m: number, saturationRatio: number) =>
    activationRate({
      nucleusRadius_m,
      temperature_K: 140,
      saturationRatio,
      density: 932,
      activationTime_s: 60,
    })

  it('starts where the critical radius falls below the nucleus, at the rate 1/tau', () => {
    const germRadius_m = criticalRadius(140, 20, 932)
    expect(at(germRadius_m * 0.999, 20)).toBe(0)
    expect(at(germRadius_m * 1.001, 20)).toBe(1 / 60)
  })

  it('does not happen without supersaturation, however large the nucleus', () => {
    expect(at(1e-6, 1)).toBe(0)
    expect(at(1e-6, 0.5)).toBe(0)
  })
})
