import { availableParallelism } from 'node:os'
import { InputError } from '../../model/errors.ts'
import { planStudy, type StudyPlan } from '../../model/experiments/study.ts'
import type { CommandContext } from '../command.ts'
import { typedPath } from '../reportOutcome.ts'
import type { StopSignal } from '../stopSignals.ts'
import { warn } from '../terminal.ts'
import { assembleStudy, missingMembers } from './assembleStudy.ts'
import { type LoadedStudy, loadStudy } from './loadStudy.ts'
import { openThreadPool } from './memberPool.ts'
import { type FoundMembers, findMembers } from './memberStore.ts'
import { type Part, parsePart, shareOf } from './parsePart.ts'
import { runMembers } from './runMembers.ts'
import { openStudyDirectory, type StudyDirectory } from './studyDirectory.ts'
import { showStudyProgress, silentStudyProgress } from './studyProgress.ts'
import { STUDY_FORMAT, type StudyRecord, studyIdentity } from './studyRecord.ts'
import { isSettled } from './studyTables.ts'
import { reportBreak, reportInterruption, reportPart, reportStudy } from './sweepReport.ts'

export interface SweepArguments {
  study: string
  set: string[]
  out: string | null
  force: boolean
  jobs: number | null
  part: string | null
  maxMembers: number
  retry: boolean
  json: boolean
  quiet: boolean
}

/** A sweep on its way. */
interface Sweep {
  args: SweepArguments
  context: CommandContext
  plan: StudyPlan
  record: StudyRecord
  directory: StudyDirectory
  part: Part
}

/** Runs the members of a study that are not there yet, and assembles it when none is missing. */
export async function runSweep(args: SweepArguments, context: CommandContext): Promise<number> {
  const sweep = beginSweep(args, context)
  const found = findMembers(sweep.directory.membersPath)
  if (args.retry) found.crashes.clear()
  tellOfDamage(found, sweep)
  try {
    const signal = await work(sweep, found)
    if (signal !== null) return reportInterruption(signal, sweep.directory.path, context.terminal)
    return await finish(sweep)
  } catch (error) {
    if (!isSystemError(error)) throw error
    return reportBreak(error, sweep.directory.path, context.terminal)
  }
}

function beginSweep(args: SweepArguments, context: CommandContext): Sweep {
  const { terminal, scenarioDirectory, identity } = context
  const part = args.part === null ? { number: 1, of: 1 } : parsePart(args.part)
  refuseUnshared(args, part)
  const loaded = loadStudy(args.study, {
    set: args.set,
    scenarioDirectory,
    workingDirectory: terminal.workingDirectory,
  })
  const plan = planStudy(loaded.study, loaded.base.document, { maxMembers: args.maxMembers })
  refuseUnevenScenes(plan)
  if (!args.quiet)
    for (const warning of [...loaded.base.warnings, ...plan.warnings])
      warn(terminal, `warning: ${warning}`)
  const record = recordOf(loaded, identity)
  const target = { out: args.out, force: args.force, workingDirectory: terminal.workingDirectory }
  const directory = openStudyDirectory(target, record)
  if (!args.quiet)
    warn(terminal, `${plan.memberCount} members, in ${typedPath(directory.path, terminal)}`)
  return { args, context, plan, record, directory, part }
}

function recordOf({ name, study, base }: LoadedStudy, model: StudyRecord['model']): StudyRecord {
  return { format: STUDY_FORMAT, formatVersion: 1, name, study, base: base.document, model }
}

function refuseUnshared({ out, force }: SweepArguments, { of }: Part): void {
  if (of === 1) return
  if (out === null) throw new InputError('--part needs --out, the directory that all parts share')
  if (force) throw new InputError('--force would throw away what other parts did; leave it out')
}

function refuseUnevenScenes({ keep, axes }: StudyPlan): void {
  if (keep.sceneTimes_h.length > 0 && axes.some(({ key }) => key === 'sizes.classes'))
    throw new InputError(
      'keep.scene_times_h: scenes need the same number of size classes in all members, but sizes.classes is an axis',
    )
}

function tellOfDamage({ damagedLines }: FoundMembers, { args, context }: Sweep): void {
  if (damagedLines === 0 || args.quiet) return
  warn(
    context.terminal,
    `warning: ${damagedLines} damaged lines in the files of members; those members are done again`,
  )
}

/** Does what is missing of the share. */
async function work(sweep: Sweep, found: FoundMembers): Promise<StopSignal | null> {
  const { args, context, plan, part } = sweep
  const share = [...shareOf(part, plan.memberCount)]
  const missing = share.filter((index) => !isSettled(found, index))
  if (missing.length === 0) return null
  const stop = context.watchStopSignals()
  const jobs = Math.min(args.jobs ?? availableParallelism(), missing.length)
  const pool = await openThreadPool(context.memberWorker, jobs)
  const progress = args.quiet
    ? silentStudyProgress
    : await showStudyProgress(context.terminal, share.length, share.length - missing.length)
  try {
    return await runMembers(missing, {
      plan,
      identity: context.identity,
      membersPath: sweep.directory.membersPath,
      pool,
      stop,
      progress,
    })
  } finally {
    progress.end()
    await pool.close()
    stop.release()
  }
}

function isSystemError(error: unknown): boolean {
  return error instanceof Error && 'syscall' in error
}

/** With the members of all processes, not only our own. */
function finish({ args, context, plan, record, directory, part }: Sweep): Promise<number> {
  const found = findMembers(directory.membersPath)
  const missing = missingMembers(found, plan.memberCount)
  const style = { json: args.json, quiet: args.quiet }
  const view = { path: directory.path, plan, found }
  if (part.of > 1) {
    const own = new Set(shareOf(part, plan.memberCount))
    return reportPart(
      { ...view, missing: missing.filter((index) => own.has(index)) },
      style,
      context.terminal,
    )
  }
  const tables = { plan, found, identity: studyIdentity(record) }
  const tally = missing.length === 0 ? assembleStudy(directory.path, tables) : null
  return reportStudy({ ...view, tally, missing }, style, context.terminal)
}
