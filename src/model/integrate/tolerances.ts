import type { Column } from '../state/column.ts'

/** Accounts follow from the state and are not allowed to set the step; any finite value does. */
const UNCONTROLLED = 1e60

/** Absolute tolerance of nuclei and cores relative to that of small ice: there are many of them. */
const NUCLEI_TO_ICE = 1e3

/**
 * Absolute tolerances of the state vector, 1/m3: for ice a min(1, (10 nm/r)^6), so that the light of the largest
 * particles, which goes as r^6, is held as well as that of the small ones.
 */
export function makeAbsoluteTolerances({ layout, sizes, scenario }: Column): number[] {
  const { absoluteToleranceIce, absoluteToleranceVapour } = scenario.numerics
  const tolerances = new Array<number>(layout.length).fill(UNCONTROLLED)
  const { vapour, nuclei, ice, cores } = layout
  tolerances.fill(absoluteToleranceVapour, vapour, nuclei)
  tolerances.fill(NUCLEI_TO_ICE * absoluteToleranceIce, nuclei, ice)
  tolerances.fill(NUCLEI_TO_ICE * absoluteToleranceIce, cores, layout.waterAccount.top)
  for (let index = ice; index < cores; index++) {
    const radius = sizes.radii_m[(index - ice) % layout.classes]
    tolerances[index] = absoluteToleranceIce * Math.min(1, (1e-8 / radius) ** 6)
  }
  return tolerances
}

/**
 * Relative tolerance of vapour over that of all else. The solver's error is a mean over the whole state, of which
 * vapour is a small part: held no closer than the rest, the fast diffusion of the thin air at the top, sped up further
 * where a wave squeezes layers, is stepped past its limit of stability and vapour swings below zero. A hundredth
 * costs no evaluations.
 */
const VAPOUR_TO_ALL = 1e-2

export function makeRelativeTolerances({ layout, scenario }: Column): number[] {
  const { relativeTolerance } = scenario.numerics
  const tolerances = new Array<number>(layout.length).fill(relativeTolerance)
  return tolerances.fill(VAPOUR_TO_ALL * relativeTolerance, layout.vapour, layout.nuclei)
}
