import type { StudyPlan } from '../../model/experiments/study.ts'
import type { FoundMembers } from './memberStore.ts'
import {
  isSettled,
  type StudyTables,
  writeMembers,
  writeScenes,
  writeSensitivity,
} from './studyTables.ts'

/** How the members of a study stand. */
export interface StudyTally {
  members: number
  done: number
  failed: number
  /** Given up after too many crashes. */
  crashed: number
  /** Places in the design that are still to be done. */
  missing: number[]
}

/** Writes the final files from the members that are there; which process did them, and when, leaves no trace. */
export function assembleStudy(directory: string, tables: StudyTables): StudyTally {
  const { plan, found } = tables
  const results = writeMembers(directory, tables)
  writeSensitivity(directory, tables, results)
  if (plan.keep.sceneTimes_h.length > 0) writeScenes(directory, tables)
  return tally(plan, found, results)
}

function tally(
  { memberCount }: StudyPlan,
  found: FoundMembers,
  results: readonly (Record<string, number | null> | null)[],
): StudyTally {
  const missing = missingMembers(found, memberCount)
  const done = results.filter((result) => result !== null).length
  const failed = found.finished.size - done
  return {
    members: memberCount,
    done,
    failed,
    crashed: memberCount - missing.length - done - failed,
    missing,
  }
}

export function missingMembers(found: FoundMembers, memberCount: number): number[] {
  const all = Array.from({ length: memberCount }, (_, index) => index)
  return all.filter((index) => !isSettled(found, index))
}
