import type { MemberOutcome } from '../../model/experiments/runMember.ts'
import type { TaskEnd } from './memberWork.ts'

/** What the model made of a member; null where it gave no answer. */
export function outcomeOf(end: TaskEnd): MemberOutcome | null {
  return end.kind === 'finished' ? end.outcome : null
}
