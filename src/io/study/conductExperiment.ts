import { rmSync } from 'node:fs'
import { availableParallelism } from 'node:os'
import { InputError } from '../../model/errors.ts'
import type { CommandContext } from '../command.ts'
import { DONE, FAILED, MEMBERS_FAILED } from '../exitCodes.ts'
import { typedPath } from '../reportOutcome.ts'
import { createRunDirectory, type RunDirectory } from '../runDirectory.ts'
import { STOP_EXIT_CODES, type StopSignal } from '../stopSignals.ts'
import { print, type Terminal, warn } from '../terminal.ts'
import { writeExperimentRecord } from './experimentRecord.ts'
import { openThreadPool } from './memberPool.ts'
import type { StudyTask, TaskEnd } from './memberWork.ts'
import { runTasks } from './runTasks.ts'
import { showStudyProgress, silentStudyProgress } from './studyProgress.ts'

/** What the experiments on the command line have in common. */
export interface ExperimentArguments {
  out: string | null
  force: boolean
  jobs: number | null
  json: boolean
  quiet: boolean
}

/** What an experiment has found once its runs are done. */
export interface Conclusion {
  asked: Record<string, unknown>
  found: Record<string, unknown>
  /** For the screen. */
  text: string
  warnings: string[]
  /** The file to look at next. */
  table: string
  /** Whether some of its runs failed. */
  isPartial: boolean
}

/** Runs and what is made of them. */
export interface Experiment {
  kind: string
  /** Names its directory below `runs/`. */
  name: string
  /** The runs, which may write into the directory of the experiment while it grows. */
  tasks(partialPath: string): StudyTask[]
  /** Writes the tables; throws an ExperimentFailure when there is nothing to conclude. */
  conclude(ends: readonly TaskEnd[], partialPath: string): Promise<Conclusion>
}

/** The runs that everything rests on have failed. */
export class ExperimentFailure extends Error {
  override readonly name = 'ExperimentFailure'
}

/** Runs an experiment into a directory of its own and returns the exit code. */
export async function conductExperiment(
  experiment: Experiment,
  args: ExperimentArguments,
  context: CommandContext,
): Promise<number> {
  const { terminal } = context
  const { out, force, quiet } = args
  const target = {
    out,
    force,
    scenarioName: experiment.name,
    workingDirectory: terminal.workingDirectory,
  }
  const directory = createRunDirectory(target)
  const typed = typedPath(directory.partialPath, terminal)
  if (!quiet) warn(terminal, `working in ${typed}`)
  try {
    const ends = await workThrough(experiment.tasks(directory.partialPath), args, context)
    if (typeof ends === 'string') {
      warn(terminal, `stopped by ${ends}; what was written until then is in ${typed}`)
      return STOP_EXIT_CODES[ends]
    }
    return await conclude(experiment, { ends, directory }, args, context)
  } catch (error) {
    if (error instanceof InputError) {
      rmSync(directory.partialPath, { recursive: true, force: true })
      throw error
    }
    warn(terminal, error instanceof Error ? error.message : String(error))
    warn(terminal, `what was written until then is in ${typed}`)
    return FAILED
  }
}

/** The end of every task in the order of the tasks, or the signal that stopped them. */
async function workThrough(
  tasks: readonly StudyTask[],
  { jobs, quiet }: ExperimentArguments,
  { terminal, memberWorker, watchStopSignals }: CommandContext,
): Promise<TaskEnd[] | StopSignal> {
  const ends: TaskEnd[] = new Array(tasks.length)
  if (tasks.length === 0) return ends
  const stop = watchStopSignals()
  const pool = await openThreadPool(
    memberWorker,
    Math.min(jobs ?? availableParallelism(), tasks.length),
  )
  const progress = quiet ? silentStudyProgress : await showStudyProgress(terminal, tasks.length, 0)
  try {
    const signal = await runTasks(tasks.keys(), {
      pool,
      stop,
      taskOf: (place) => tasks[place],
      take(place, end) {
        if (end.kind === 'refused') throw new InputError(end.message)
        ends[place] = end
        progress.count()
      },
    })
    return signal ?? ends
  } finally {
    progress.end()
    await pool.close()
    stop.release()
  }
}

async function conclude(
  { kind, conclude: judge }: Experiment,
  { ends, directory }: { ends: TaskEnd[]; directory: RunDirectory },
  { json, quiet }: ExperimentArguments,
  { terminal, identity }: CommandContext,
): Promise<number> {
  const conclusion = await judge(ends, directory.partialPath)
  const { asked, found, warnings, isPartial } = conclusion
  writeExperimentRecord(directory.partialPath, kind, { model: identity, asked, found })
  const path = directory.publish()
  const status = isPartial ? 'partial' : 'finished'
  if (json)
    await print(terminal, `${JSON.stringify({ status, directory: path, ...asked, ...found })}\n`)
  else await printConclusion(conclusion, { path, quiet }, terminal)
  if (!quiet) for (const warning of warnings) warn(terminal, `warning: ${warning}`)
  return isPartial ? MEMBERS_FAILED : DONE
}

async function printConclusion(
  { text, table }: Conclusion,
  { path, quiet }: { path: string; quiet: boolean },
  terminal: Terminal,
): Promise<void> {
  const typed = typedPath(path, terminal)
  if (quiet) {
    await print(terminal, `${typed}\n`)
    return
  }
  await print(terminal, text)
  const next = `${terminal.calledAs} show ${typed}/${table} --csv`
  await print(terminal, `The output is in ${typed}; look at it with: ${next}\n`)
}

/** Why a run gave no result; null for one that did. */
export function failureOf(end: TaskEnd): string | null {
  if (end.kind === 'crashed') return end.reason
  if (end.kind === 'refused') return end.message
  return end.kind === 'finished' && end.outcome.status === 'failed' ? end.outcome.reason : null
}
