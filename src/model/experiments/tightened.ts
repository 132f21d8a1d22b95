import type { ScenarioDocument } from '../scenario/schema.ts'

/** The finest relative tolerance that a scenario may ask for. */
const FINEST = 1e-12

/** The same scenario integrated with all tolerances divided by a factor: what then differs is numerical. */
export function tightened(document: ScenarioDocument, factor = 100): ScenarioDocument {
  const { numerics } = document
  return {
    ...document,
    numerics: {
      ...numerics,
      relative_tolerance: Math.max(numerics.relative_tolerance / factor, FINEST),
      absolute_tolerance_ice_per_m3: numerics.absolute_tolerance_ice_per_m3 / factor,
      absolute_tolerance_vapour_per_m3: numerics.absolute_tolerance_vapour_per_m3 / factor,
    },
  }
}
