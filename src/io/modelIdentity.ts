import { readFileSync } from 'node:fs'
import { join } from 'node:path'

/** Which program ran: written by the build. */
export interface ModelIdentity {
  name: string
  version: string
  /** SHA-256 over the compiled model. */
  model: string
  /** Exact versions of the run-time libraries. */
  libraries: Record<string, string>
}

/** @param builtDirectory where the compiled program lies (`dist`) */
export function readModelIdentity(builtDirectory: string): ModelIdentity {
  return JSON.parse(readFileSync(join(builtDirectory, 'identity.json'), 'utf8'))
}
