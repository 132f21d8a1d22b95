import { InputError } from '../../model/errors.ts'
import { memberDiagnostics, memberDocument, type StudyPlan } from '../../model/experiments/study.ts'
import { resolve } from '../../model/scenario/resolve.ts'
import type { ScenarioDocument } from '../../model/scenario/schema.ts'
import type { ModelIdentity } from '../modelIdentity.ts'
import { runIdentity } from '../runIdentity.ts'
import type { StopSignal } from '../stopSignals.ts'
import { type MemberFile, openMemberFile } from './memberFile.ts'
import type { KeptResult } from './memberLine.ts'
import type { MemberPool } from './memberPool.ts'
import type { TaskEnd } from './memberWork.ts'
import { runTasks } from './runTasks.ts'
import type { StudyProgress } from './studyProgress.ts'

export interface MemberRun {
  plan: StudyPlan
  identity: ModelIdentity
  /** Where this process puts its file of finished members. */
  membersPath: string
  pool: MemberPool
  stop: { signal(): StopSignal | null }
  progress: StudyProgress
}

interface Item {
  index: number
  key: string
  document: ScenarioDocument
}

/** The members to do, each made when its turn comes. */
function* itemsOf(indices: Iterable<number>, { plan, identity }: MemberRun): Generator<Item> {
  for (const index of indices) {
    const document = memberDocument(plan, index)
    yield { index, document, key: runIdentity(resolve(document).scenario, identity, null) }
  }
}

function kept(plan: StudyPlan, end: Extract<TaskEnd, { kind: 'finished' }>): KeptResult {
  const { outcome } = end
  if (outcome.status === 'failed') return outcome
  const { scenes, solver } = outcome
  return { status: 'done', diagnostics: memberDiagnostics(plan, outcome), scenes, solver }
}

function record(file: MemberFile, plan: StudyPlan, { index, key }: Item, end: TaskEnd): void {
  if (end.kind === 'finished') file.append({ kind: 'member', index, key, result: kept(plan, end) })
  else if (end.kind === 'crashed') file.append({ kind: 'crash', index, key, reason: end.reason })
  else if (end.kind === 'refused') throw new InputError(`member ${index}: ${end.message}`)
}

/** Runs members of a study and keeps each as it ends. Returns the signal that stopped it, if any. */
export async function runMembers(
  indices: Iterable<number>,
  run: MemberRun,
): Promise<StopSignal | null> {
  const { plan, pool, stop, progress } = run
  const file = openMemberFile(run.membersPath)
  try {
    return await runTasks(itemsOf(indices, run), {
      pool,
      stop,
      taskOf: ({ document }) => ({ work: 'workMember', document, keep: plan.keep }),
      take(item, end) {
        record(file, plan, item, end)
        progress.count()
      },
    })
  } finally {
    file.close()
  }
}
