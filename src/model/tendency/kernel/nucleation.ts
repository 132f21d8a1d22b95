import { BOLTZMANN } from '../../constants.ts'
import { fletcherFactor } from '../../processes/fletcherFactor.ts'
import { impingementRate } from '../../processes/impingementRate.ts'
import { moleculeVolume } from '../../processes/moleculeVolume.ts'
import type { Column } from '../../state/column.ts'
import type { AirCoefficients } from '../airCoefficients.ts'
import { type GermEntry, germEntry } from '../germEntry.ts'

/** Barriers above this many kT nucleate nothing in the age of the Earth. */
const HOPELESS_BARRIER = 120

/** Sets the rate of each nucleus class of a level, 1/s. */
type Rates = (air: AirCoefficients, i: number, germ: number, vapourPressure: number) => void

/**
 * Adds the nucleation of `nucleationRate` or `activationRate` over the whole column to dy, with what depends on
 * temperature and saturation alone worked out once per level. A nucleus becomes a particle with the radius of the
 * larger of nucleus and critical germ: smaller ones could not last.
 */
export function makeNucleation(column: Column) {
  const { scenario, layout } = column
  const { scheme } = scenario.nucleation
  const rates = new Float64Array(layout.nucleusClasses)
  const findRates = scheme === 'activation' ? activation(column, rates) : classical(column, rates)
  const enter = makeGermEntry(column, rates)
  return (air: AirCoefficients, y: ArrayLike<number>, dy: number[]): void => {
    if (scheme === 'off') return
    const { pressurePerDensity, nucleationPressure, germ } = air.level
    for (let i = 0; i < layout.levels; i++) {
      const vapourPressure = y[layout.vapour + i] * pressurePerDensity[i]
      const saturation = vapourPressure / nucleationPressure[i]
      if (!(saturation > 1)) continue
      const radius = germ[i] / Math.log(saturation)
      findRates(air, i, radius, vapourPressure)
      enter(y, dy, i, radius)
    }
  }
}

function activation({ scenario }: Column, rates: Float64Array): Rates {
  const radii = scenario.background.nucleusClasses.map(({ radius_m }) => radius_m)
  const rate = 1 / scenario.numerics.nucleationCeiling_s
  return (_air, _i, germ) => {
    for (let j = 0; j < radii.length; j++) rates[j] = germ < radii[j] ? rate : 0
  }
}

/** J per nucleus of each class, 1/s; see `nucleationRate` for the formula. */
function classical(column: Column, rates: Float64Array): Rates {
  const { scenario } = column
  const { contactParameter } = scenario.nucleation
  const largestFirst = scenario.background.nucleusClasses
    .map(({ radius_m }, j) => ({ radius_m, j }))
    .sort((a, b) => b.radius_m - a.radius_m)
  return ({ level }, i, germ, vapourPressure) => {
    rates.fill(0)
    const wholeBarrier = level.barrier[i] * germ * germ
    let common = 0
    for (const { radius_m, j } of largestFirst) {
      const barrier = wholeBarrier * fletcherFactor(contactParameter, radius_m / germ)
      // The barrier is higher still on smaller nuclei.
      if (barrier > HOPELESS_BARRIER) return
      common ||= commonFactor(column, level.temperature[i], vapourPressure, germ)
      rates[j] = common * radius_m * radius_m * Math.sqrt(barrier) * Math.exp(-barrier)
    }
  }
}

/** What J of all nuclei of a level has in common: J = common r_N^2 sqrt(DF/kT) exp(-DF/kT), 1/(m2 s). */
function commonFactor(
  { scenario }: Column,
  temperature_K: number,
  vapourPressure: number,
  germ: number,
): number {
  const { ice, nucleation } = scenario
  const thermalEnergy = BOLTZMANN * temperature_K
  const impinging = impingementRate(vapourPressure, temperature_K)
  const adsorbed =
    (impinging / nucleation.vibrationFrequency_per_s) *
    Math.exp(nucleation.desorptionEnergy_J / thermalEnergy)
  const jumps =
    adsorbed *
    nucleation.vibrationFrequency_per_s *
    nucleation.jumpDistance_m *
    Math.exp(-nucleation.surfaceDiffusionEnergy_J / thermalEnergy)
  const supply = Math.PI * germ * (2 * jumps + germ * impinging)
  const germMolecules = (4 * Math.PI * germ * germ * germ) / (3 * moleculeVolume(ice.density))
  return (4 * Math.PI * adsorbed * supply) / (germMolecules * Math.sqrt(3 * Math.PI))
}

/** Moves what nucleates in a level from nuclei and vapour to ice. */
function makeGermEntry({ layout, sizes, scenario }: Column, rates: Float64Array) {
  const { density } = scenario.ice
  const { molecules } = sizes
  const radii = scenario.background.nucleusClasses.map(({ radius_m }) => radius_m)
  const ownEntries = radii.map((radius) => germEntry(radius, sizes, density))
  const ceiling = 1 / scenario.numerics.nucleationCeiling_s
  return (y: ArrayLike<number>, dy: number[], i: number, germ: number): void => {
    let sharedEntry: GermEntry | null = null
    for (let j = 0; j < radii.length; j++) {
      if (rates[j] === 0) continue
      const place = i * layout.nucleusClasses + j
      const born = Math.min(rates[j], ceiling) * y[layout.nuclei + place]
      if (radii[j] < germ) sharedEntry ??= germEntry(germ, sizes, density)
      const { lowerClass, upperShare } =
        radii[j] < germ && sharedEntry ? sharedEntry : ownEntries[j]
      const upper = born * upperShare
      const cell = layout.ice + i * layout.classes + lowerClass
      dy[layout.nuclei + place] -= born
      dy[layout.cores + place] += born
      dy[cell] += born - upper
      dy[cell + 1] += upper
      dy[layout.vapour + i] -=
        (born - upper) * molecules[lowerClass] + upper * molecules[lowerClass + 1]
    }
  }
}
