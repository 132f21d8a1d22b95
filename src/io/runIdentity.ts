import { createHash } from 'node:crypto'
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
  const { title: _, ...physics } = scenario
  const start = from && { ...from, y: Array.from(from.y) }
  return createHash('sha256')
    .update(canonicalJson({ scenario: physics, model, start }))
    .digest('hex')
}
