import { resolve } from 'node:path'
import { InputError } from '../../model/errors.ts'
import { planStudy } from '../../model/experiments/study.ts'
import { canonicalJson } from '../canonicalJson.ts'
import type { CommandContext } from '../command.ts'
import { assembleStudy, missingMembers } from './assembleStudy.ts'
import { findMembers } from './memberStore.ts'
import { studyDirectoryAt } from './studyDirectory.ts'
import { readStudyRecord, studyIdentity } from './studyRecord.ts'
import { reportStudy, type SweepStyle } from './sweepReport.ts'

/** Assembles a study from the members that are there, whoever did them, and tells which are missing. */
export async function gatherSweep(
  path: string,
  style: SweepStyle,
  { terminal, identity }: CommandContext,
): Promise<number> {
  const directory = studyDirectoryAt(resolve(terminal.workingDirectory, path))
  const record = readStudyRecord(directory.path)
  if (canonicalJson(record.model) !== canonicalJson(identity))
    throw new InputError(
      `${path} was made by another version of the program (${record.model.version}), so its design cannot be relied on here; gather it with that version`,
    )
  const plan = planStudy(record.study, record.base, { maxMembers: Number.POSITIVE_INFINITY })
  const found = findMembers(directory.membersPath)
  const tally = assembleStudy(directory.path, { plan, found, identity: studyIdentity(record) })
  const missing = missingMembers(found, plan.memberCount)
  return reportStudy({ path: directory.path, plan, found, tally, missing }, style, terminal)
}
