import { InputError } from '../../model/errors.ts'
import { type Keep, type MemberOutcome, runMember } from '../../model/experiments/runMember.ts'
import type { ScenarioDocument } from '../../model/scenario/schema.ts'
import type { ModelIdentity } from '../modelIdentity.ts'
import type { RunTarget } from '../runDirectory.ts'
import type { LoadedScenario } from '../scenario/loadScenario.ts'

/** One run of a study, of which only numbers are kept. */
export interface MemberTask {
  work: 'workMember'
  document: ScenarioDocument
  keep: Keep
}

/** One run into a directory of its own. */
export interface RunTask {
  work: 'workRun'
  loaded: LoadedScenario
  target: RunTarget
  identity: ModelIdentity
}

export type StudyTask = MemberTask | RunTask

/** How a task ended. Everything is a value, because errors lose their fields on the way out of a thread. */
export type TaskEnd =
  | { kind: 'finished'; outcome: MemberOutcome }
  | { kind: 'written'; directory: string }
  /** Bad input. */
  | { kind: 'refused'; message: string }
  /** Not an answer of the model: an unforeseen error, or a thread that is gone. */
  | { kind: 'crashed'; reason: string }

function messageOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error)
}

function endOf(error: unknown): TaskEnd {
  if (error instanceof InputError) return { kind: 'refused', message: error.message }
  return { kind: 'crashed', reason: messageOf(error) }
}

/** Runs a member in the thread that calls it. */
export function workMember({ document, keep }: MemberTask): TaskEnd {
  try {
    return { kind: 'finished', outcome: runMember(document, keep) }
  } catch (error) {
    return endOf(error)
  }
}

/** Runs a scenario into its directory in the thread that calls it. */
export async function workRun({ loaded, target, identity }: RunTask): Promise<TaskEnd> {
  try {
    // Not for members: writing tables takes more time to load than a small member takes to run.
    const [{ runScenario }, { columnModel }, { silentProgress }] = await Promise.all([
      import('../runScenario.ts'),
      import('../columnModel.ts'),
      import('../runProgress.ts'),
    ])
    const outcome = await runScenario({
      loaded,
      target,
      from: null,
      identity,
      model: columnModel,
      stop: { signal: () => null },
      begin: async () => silentProgress,
    })
    if (outcome.status === 'finished') return { kind: 'written', directory: outcome.directory }
    if (outcome.status === 'interrupted') return { kind: 'crashed', reason: outcome.signal }
    return { kind: 'finished', outcome: { status: 'failed', reason: messageOf(outcome.error) } }
  } catch (error) {
    return endOf(error)
  }
}
