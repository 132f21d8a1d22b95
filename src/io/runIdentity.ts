import { createHash } from 'node:crypto'
import { isNeutral, timeEdges } from '../model/atmosphere/perturbation.ts'
import type { Scenario } from '../model/scenario/types.ts'
import type { Snapshot } from '../model/simulate.ts'
import { canonicalJson } from './canonicalJson.ts'
import type { ModelIdentity } from './modelIdentity.ts'

/**
 * What makes two runs the same: SHA-256, hexadecimal, of the canonical JSON of the resolved scenario (without its
 * title), the program, and the state that the run went on from, if any. Equal identities give equal Arrow files on one
 * Node version and architecture.
 */
export function runIdentity(
  scenario: Scenario,
  model: ModelIdentity,
  from: Snapshot | null,
): string {
  const { title: _, ...physics } = withoutNeutral(scenario)
  const start = from && { ...from, y: Array.from(from.y) }
  return createHash('sha256')
    .update(canonicalJson({ scenario: physics, model, start }))
    .digest('hex')
}

/** A perturbation that changes nothing is no more than the instants at which it would begin and end. */
function withoutNeutral(scenario: Scenario): Scenario {
  const { perturbations, numerics } = scenario
  const edges = perturbations.filter(isNeutral).flatMap(({ time }) => timeEdges(time))
  const breakPoints_s = [...new Set([...numerics.breakPoints_s, ...edges])]
    .filter((time) => time > 0 && time < scenario.duration_s)
    .sort((a, b) => a - b)
  return {
    ...scenario,
    perturbations: perturbations.filter((change) => !isNeutral(change)),
    numerics: { ...numerics, breakPoints_s },
  }
}
