import { basename, dirname, extname, join, resolve } from 'node:path'
import { InputError } from '../model/errors.ts'
import { columnModel } from './columnModel.ts'
import type { CommandContext } from './command.ts'
import { reportOutcome, typedPath } from './reportOutcome.ts'
import { showProgress, silentProgress } from './runProgress.ts'
import { findRunRecord, type RunRecord, readRunRecord } from './runRecord.ts'
import { type RunRequest, runScenario } from './runScenario.ts'
import { readSavedState } from './savedStates.ts'
import { loadScenario } from './scenario/loadScenario.ts'
import { warn } from './terminal.ts'
import { parseTime } from './timeText.ts'

export interface RunArguments {
  scenario: string | null
  set: string[]
  out: string | null
  force: boolean
  from: string | null
  at: string | null
  json: boolean
  quiet: boolean
}

/** What to run and, when it is the record of an earlier run, that record and where it lies. */
interface Source {
  path: string
  earlier: { record: RunRecord; directory: string } | null
}

function findSource(args: RunArguments, workingDirectory: string): Source {
  if (args.scenario === null && args.from !== null) {
    const record = readRunRecord(resolve(workingDirectory, args.from))
    return { path: join(args.from, 'run.json'), earlier: { record, directory: args.from } }
  }
  if (args.scenario === null)
    throw new InputError(
      'give a scenario, or --from RUN_DIR; mesofrost scenarios lists shipped ones',
    )
  const record = findRunRecord(resolve(workingDirectory, args.scenario))
  const directory = dirname(args.scenario)
  return { path: args.scenario, earlier: record && { record, directory } }
}

/** The state to start from: the one asked for, or the one that an earlier run had itself started from. */
async function findStart(
  args: RunArguments,
  { earlier }: Source,
  workingDirectory: string,
): Promise<RunRequest['from']> {
  if (args.from !== null) {
    const time_s = args.at === null ? 'last' : parseTime(args.at)
    const saved = await readSavedState(resolve(workingDirectory, args.from), time_s)
    return { directory: args.from, saved }
  }
  if (earlier === null || earlier.record.continuedFrom === null) return null
  const saved = await readSavedState(resolve(workingDirectory, earlier.directory), 'first')
  return { directory: earlier.record.continuedFrom.directory, saved }
}

function fileStem(path: string): string {
  return basename(path, extname(path))
}

export async function runFromCommandLine(
  args: RunArguments,
  context: CommandContext,
): Promise<number> {
  const { terminal, identity, scenarioDirectory } = context
  const source = findSource(args, terminal.workingDirectory)
  const loaded = loadScenario(source.path, {
    set: args.set,
    shippedDirectory: scenarioDirectory,
    workingDirectory: terminal.workingDirectory,
  })
  const from = await findStart(args, source, terminal.workingDirectory)
  if (!args.quiet) for (const warning of loaded.warnings) warn(terminal, `warning: ${warning}`)
  const begin: RunRequest['begin'] = async (range) =>
    args.quiet ? silentProgress : showProgress(terminal, range)
  const target = {
    out: args.out,
    force: args.force,
    scenarioName: source.earlier?.record.name ?? fileStem(loaded.sourcePath),
    workingDirectory: terminal.workingDirectory,
    announce(partialPath: string) {
      if (!args.quiet) warn(terminal, `working in ${typedPath(partialPath, terminal)}`)
    },
  }
  const stop = context.watchStopSignals()
  try {
    const request = { loaded, target, from, identity, model: columnModel, stop, begin }
    const outcome = await runScenario(request)
    const { json, quiet } = args
    return await reportOutcome(outcome, { json, quiet, told: loaded.warnings }, terminal)
  } finally {
    stop.release()
  }
}
