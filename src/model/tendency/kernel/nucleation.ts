import { fletcherFactor } from '../../processes/fletcherFactor.ts'
import { moleculeVolume } from '../../processes/moleculeVolume.ts'
import type { Column } from '../../state/column.ts'
import type { AirCoefficients, LevelCoefficients } from '../airCoefficients.ts'
import { type GermEntry, germEntry } from '../germEntry.ts'

/** Barriers above this many kT nucleate nothing in the age of the Earth. */
const HOPELESS_BARRIER = 120

export interface NucleationKernel {
  add(coefficients: AirCoefficients, y: ArrayLike<number>, dy: number[]): void
}

/**
 * The nucleation of `nucleationRate` or `activationRate` over the whole column, with what depends on temperature and
 * saturation alone worked out once per level. A nucleus becomes a particle with the radius of the larger of nucleus
 * and critical germ: smaller ones could not last.
 */
export function makeNucleationKernel(column: Column): NucleationKernel {
  const { scenario, sizes, layout } = column
  const { scheme } = scenario.nucleation
  const radii = scenario.background.nucleusClasses.map(({ radius_m }) => radius_m)
  const ownEntries = radii.map((radius) => germEntry(radius, sizes, scenario.ice.density))
  const ceiling = 1 / scenario.numerics.nucleationCeiling_s
  const rates = new Float64Array(radii.length)
  return {
    add({ level }, y, dy) {
      if (scheme === 'off') return
      for (let i = 0; i < layout.levels; i++) {
        const vapourPressure = y[layout.vapour + i] * level.pressurePerDensity[i]
        const saturation = vapourPressure / level.nucleationPressure[i]
        if (!(saturation > 1)) continue
        const germ = level.germ[i] / Math.log(saturation)
        if (scheme === 'activation') activate(rates, radii, germ, ceiling)
        else classicalRates(rates, radii, column, { level, i, germ, vapourPressure })
        enter(rates, radii, ownEntries, column, { i, germ, ceiling, y, dy })
      }
    },
  }
}

function activate(
  rates: Float64Array,
  radii: readonly number[],
  germ: number,
  ceiling: number,
): void {
  for (let j = 0; j < radii.length; j++) rates[j] = germ < radii[j] ? ceiling : 0
}

/** J per nucleus of each class, 1/s; see `nucleationRate` for the formula. */
function classicalRates(
  rates: Float64Array,
  radii: readonly number[],
  { scenario }: Column,
  at: { level: LevelCoefficients; i: number; germ: number; vapourPressure: number },
): void {
  const { level, i, germ, vapourPressure } = at
  const { contactParameter } = scenario.nucleation
  const impinging = vapourPressure * level.impingement[i]
  const adsorbed = impinging * level.adsorption[i]
  const supply = Math.PI * germ * (2 * adsorbed * level.surfaceJumps[i] + germ * impinging)
  const wholeBarrier = level.barrier[i] * germ * germ
  const germMolecules = (4 * Math.PI * germ ** 3) / (3 * moleculeVolume(scenario.ice.density))
  const common = (4 * Math.PI * adsorbed * supply) / (germMolecules * Math.sqrt(3 * Math.PI))
  for (let j = 0; j < radii.length; j++) {
    const barrier = wholeBarrier * fletcherFactor(contactParameter, radii[j] / germ)
    rates[j] =
      barrier > HOPELESS_BARRIER
        ? 0
        : common * radii[j] * radii[j] * Math.sqrt(barrier) * Math.exp(-barrier)
  }
}

function enter(
  rates: Float64Array,
  radii: readonly number[],
  ownEntries: readonly GermEntry[],
  { layout, sizes, scenario }: Column,
  at: { i: number; germ: number; ceiling: number; y: ArrayLike<number>; dy: number[] },
): void {
  const { i, germ, ceiling, y, dy } = at
  let sharedEntry: GermEntry | null = null
  for (let j = 0; j < radii.length; j++) {
    if (rates[j] === 0) continue
    const place = i * layout.nucleusClasses + j
    const born = Math.min(rates[j], ceiling) * y[layout.nuclei + place]
    if (radii[j] < germ) sharedEntry ??= germEntry(germ, sizes, scenario.ice.density)
    const entry = radii[j] < germ && sharedEntry ? sharedEntry : ownEntries[j]
    const upper = born * entry.upperShare
    const cell = layout.ice + i * layout.classes + entry.lowerClass
    dy[layout.nuclei + place] -= born
    dy[layout.cores + place] += born
    dy[cell] += born - upper
    dy[cell + 1] += upper
    dy[layout.vapour + i] -=
      (born - upper) * sizes.molecules[entry.lowerClass] +
      upper * sizes.molecules[entry.lowerClass + 1]
  }
}
