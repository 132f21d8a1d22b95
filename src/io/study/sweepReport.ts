import type { StudyPlan } from '../../model/experiments/study.ts'
import { DONE, FAILED, MEMBERS_FAILED } from '../exitCodes.ts'
import { typedPath } from '../reportOutcome.ts'
import { STOP_EXIT_CODES, type StopSignal } from '../stopSignals.ts'
import { print, type Terminal, warn } from '../terminal.ts'
import type { StudyTally } from './assembleStudy.ts'
import type { FoundMembers } from './memberStore.ts'
import { numberRanges } from './numberRanges.ts'
import { MOST_CRASHES } from './studyTables.ts'

export interface SweepStyle {
  json: boolean
  quiet: boolean
}

export interface SweepView {
  path: string
  plan: StudyPlan
  found: FoundMembers
  /** Places in the design that are still to be done. */
  missing: number[]
}

/** Tells that a study was stopped, and how to go on. */
export function reportInterruption(signal: StopSignal, path: string, terminal: Terminal): number {
  const typed = typedPath(path, terminal)
  warn(terminal, `stopped by ${signal}; the members that were done by then are kept in ${typed}`)
  warn(terminal, `to go on: the same command with --out ${typed}`)
  return STOP_EXIT_CODES[signal]
}

/** Tells that a study broke off because of the machine, not of the model. */
export function reportBreak(error: unknown, path: string, terminal: Terminal): number {
  const code = (error as NodeJS.ErrnoException).code
  const message = error instanceof Error ? error.message : String(error)
  const isFull = code === 'ENOSPC' || code === 'EDQUOT' || code === 'EFBIG'
  const what = isFull ? `the disk is full or a file grows too large (${message})` : message
  const typed = typedPath(path, terminal)
  warn(terminal, `${what}; the members that were done by then are kept in ${typed}`)
  warn(terminal, `to go on, once that is mended: the same command with --out ${typed}`)
  return FAILED
}

function warnOfCrashes({ found, missing }: SweepView, terminal: Terminal): void {
  const crashed = missing.filter((index) => found.crashes.has(index))
  if (crashed.length === 0) return
  const reason = found.crashes.get(crashed[0])?.reason
  warn(
    terminal,
    `crashed: ${numberRanges(crashed)} (${reason}); the same command with --out tries again, up to ${MOST_CRASHES} times`,
  )
}

/** Tells how one part of a study ended and returns the exit code. */
export async function reportPart(
  view: SweepView,
  { json, quiet }: SweepStyle,
  terminal: Terminal,
): Promise<number> {
  const { path, missing } = view
  const typed = typedPath(path, terminal)
  if (json) {
    const status = missing.length === 0 ? 'finished' : 'incomplete'
    await print(terminal, `${JSON.stringify({ status, directory: path, missing })}\n`)
  } else if (quiet) await print(terminal, `${typed}\n`)
  else
    await print(
      terminal,
      `This part is ${missing.length === 0 ? 'done' : 'not complete'}; when all parts are, put them together with: ${terminal.calledAs} sweep-gather ${typed}\n`,
    )
  warnOfCrashes(view, terminal)
  return missing.length === 0 ? DONE : MEMBERS_FAILED
}

function warnOfWriters({ found }: SweepView, terminal: Terminal): void {
  if (found.writers.size < 2) return
  const writers = [...found.writers].sort().join('; ')
  warn(
    terminal,
    `warning: members come from different Node versions or machines (${writers}); equal bytes are promised for one only`,
  )
}

function countsText({ members, done, failed, crashed, missing }: StudyTally): string {
  const others = [
    failed > 0 ? `${failed} failed` : '',
    crashed > 0 ? `${crashed} crashed` : '',
    missing.length > 0 ? `${missing.length} missing` : '',
  ].filter((text) => text !== '')
  return [`${done} of ${members} members done`, ...others].join(', ')
}

/** Tells how a study stands and returns the exit code. A tally stands for final files that were written. */
export async function reportStudy(
  view: SweepView & { tally: StudyTally | null },
  { json, quiet }: SweepStyle,
  terminal: Terminal,
): Promise<number> {
  const { path, missing, tally, plan } = view
  const typed = typedPath(path, terminal)
  const isComplete = missing.length === 0
  if (json) {
    const status = isComplete ? 'finished' : 'incomplete'
    await print(terminal, `${JSON.stringify({ status, directory: path, ...tally, missing })}\n`)
  } else if (quiet) await print(terminal, `${typed}\n`)
  else if (tally !== null) {
    await print(terminal, `${plan.title}: ${countsText(tally)}\n`)
    const next = `${terminal.calledAs} show ${typed}/sensitivity.arrow`
    await print(terminal, `The output is in ${typed}; look at it with: ${next}\n`)
  }
  if (!quiet) warnOfWriters(view, terminal)
  if (!isComplete) warn(terminal, `missing: ${numberRanges(missing)} of ${plan.memberCount}`)
  warnOfCrashes(view, terminal)
  if (tally !== null && tally.failed + tally.crashed > 0)
    warn(terminal, `the reasons are in ${typed}/members.arrow, in the column reason`)
  return isComplete && tally !== null && tally.failed + tally.crashed === 0 ? DONE : MEMBERS_FAILED
}
