import { relative } from 'node:path'
import { type FailurePlace, ModelError } from '../model/errors.ts'
import { DONE, FAILED } from './exitCodes.ts'
import type { RunRecord } from './runRecord.ts'
import type { RunOutcome } from './runScenario.ts'
import { STOP_EXIT_CODES } from './stopSignals.ts'
import { print, type Terminal, warn } from './terminal.ts'
import { pairLines, shortNumber } from './textTable.ts'
import { formatTime } from './timeText.ts'

interface ReportStyle {
  json: boolean
  quiet: boolean
  /** Warnings that the user has seen already. */
  told: readonly string[]
}

/** A path as one would type it from where the program was started. */
export function typedPath(path: string, { workingDirectory }: Terminal): string {
  const short = relative(workingDirectory, path)
  const typed = short === '' || short.startsWith('..') ? path : short
  return /^[\w./-]+$/.test(typed) ? typed : `'${typed.replaceAll("'", "'\\''")}'`
}

function asJson(outcome: RunOutcome): string {
  if (outcome.status === 'failed') {
    const { directory, error } = outcome
    return `${JSON.stringify({ status: 'failed', directory, failure: messageOf(error) })}\n`
  }
  const { status, identity, summary, warnings, solver, wallClock_s } = outcome.record
  const { directory } = outcome
  return `${JSON.stringify({ status, directory, identity: identity.run, summary, warnings, solver, wallClock_s })}\n`
}

function summaryText(record: RunRecord): string {
  const pairs = Object.entries(record.summary).map(([name, value]): [string, string] => [
    name,
    value === null ? '-' : shortNumber(value),
  ])
  return `${record.title}\n${pairLines([...pairs, ['run_time_s', shortNumber(record.wallClock_s)]])}`
}

function messageOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error)
}

function placeText({ time_s, altitude_m, quantity }: FailurePlace): string {
  const altitude = altitude_m === null ? '' : `, ${shortNumber(altitude_m / 1000)} km`
  return `at ${formatTime(time_s)}${altitude}${quantity === null ? '' : `, in ${quantity}`}`
}

/** What went wrong, where, and what the user may do about it. */
function failureText(error: unknown): string {
  if (error instanceof ModelError)
    return `the run failed ${placeText(error.place)}: ${error.message}. Try tighter tolerances (--set numerics.relative_tolerance=1e-4), more steps between outputs (numerics.max_steps_per_interval), or gentler forcing; mesofrost check --at ${shortNumber(error.place.time_s / 3600)}h shows the air there`
  const code = (error as NodeJS.ErrnoException | null)?.code
  if (code === 'ENOSPC' || code === 'EDQUOT' || code === 'EFBIG')
    return `the disk is full or the file grows too large (${messageOf(error)}). Make room, write elsewhere with --out, or write less (--set output.size_distribution=never)`
  return `the run failed: ${messageOf(error)}`
}

function reportFailure(error: unknown, terminal: Terminal): number {
  warn(terminal, failureText(error))
  if (process.env.MESOFROST_DEBUG === '1' && error instanceof Error)
    terminal.stderr.write(`${error.stack}\n`)
  return FAILED
}

/** Tells how a run ended and returns the exit code. */
export async function reportOutcome(
  outcome: RunOutcome,
  style: ReportStyle,
  terminal: Terminal,
): Promise<number> {
  const path = typedPath(outcome.directory, terminal)
  if (style.json) await print(terminal, asJson(outcome))
  if (outcome.status === 'failed') {
    const code = reportFailure(outcome.error, terminal)
    warn(terminal, `what was computed until then is in ${path}`)
    return code
  }
  if (!style.quiet)
    for (const warning of outcome.record.warnings)
      if (!style.told.includes(warning)) warn(terminal, `warning: ${warning}`)
  if (outcome.status === 'interrupted') {
    warn(terminal, `stopped by ${outcome.signal}; what was computed until then is in ${path}`)
    warn(terminal, `to go on: ${terminal.calledAs} run --from ${path}`)
    return STOP_EXIT_CODES[outcome.signal]
  }
  if (style.json) return DONE
  if (style.quiet) {
    await print(terminal, `${path}\n`)
    return DONE
  }
  await print(terminal, summaryText(outcome.record))
  const next = `${terminal.calledAs} show ${path} --at ${outcome.record.scenario.duration_h}h`
  await print(terminal, `The output is in ${path}; look at it with: ${next}\n`)
  return DONE
}
