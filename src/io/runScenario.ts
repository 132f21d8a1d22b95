import { rmSync } from 'node:fs'
import { setImmediate as nextTurn } from 'node:timers/promises'
import { InputError } from '../model/errors.ts'
import type { SimulationEvent, Snapshot, SolverStatistics } from '../model/simulate.ts'
import type { Column } from '../model/state/column.ts'
import type { ColumnModel } from './columnModel.ts'
import { makeRunRecord, type RunEnding } from './makeRunRecord.ts'
import type { ModelIdentity } from './modelIdentity.ts'
import { createRunDirectory, type RunDirectory, type RunTarget } from './runDirectory.ts'
import { runIdentity } from './runIdentity.ts'
import type { ProgressRange, RunProgress } from './runProgress.ts'
import { type RunRecord, writeRunRecord } from './runRecord.ts'
import { openRunTables, type RunTables } from './runTables.ts'
import type { SavedState } from './savedStates.ts'
import type { LoadedScenario } from './scenario/loadScenario.ts'
import { chooseSizeDistribution } from './sizeDistributionChoice.ts'
import type { StopSignal } from './stopSignals.ts'
import { formatTime } from './timeText.ts'

export interface RunRequest {
  loaded: LoadedScenario
  target: RunTarget
  /** The saved state to go on from, and the run directory it lies in. */
  from: { directory: string; saved: SavedState } | null
  identity: ModelIdentity
  model: ColumnModel
  stop: { signal(): StopSignal | null }
  /** Called once, when the run begins. */
  begin(range: ProgressRange): Promise<RunProgress>
}

export type RunOutcome =
  | { status: 'finished'; directory: string; record: RunRecord }
  | { status: 'interrupted'; directory: string; record: RunRecord; signal: StopSignal }
  | { status: 'failed'; directory: string; error: unknown }

/** A run on its way. */
interface Run {
  request: RunRequest
  column: Column
  directory: RunDirectory
  tables: RunTables
  progress: RunProgress
  stateInterval_s: number
  /** Kept so that the final state is saved whatever the interval; null once it is. */
  unsaved: Snapshot | null
  savedIntervals: number
  ending: RunEnding
}

/** How long the program may be deaf to signals. */
const LONGEST_TURN_MS = 50
/** Output times are sums of intervals; this is far above their rounding and far below any interval. */
const ROUNDING = 1e-6

/** Runs a scenario into a directory of its own. Bad input throws an InputError and leaves nothing behind. */
export async function runScenario(request: RunRequest): Promise<RunOutcome> {
  const startedAt = new Date()
  const column = request.model.prepareColumn(request.loaded.scenario)
  checkStart(request, column)
  const directory = createRunDirectory(request.target)
  let run: Run | null = null
  try {
    run = await openRun(request, { column, directory, startedAt })
    const signal = await drive(run)
    return finish(run, signal)
  } catch (error) {
    return fail(error, run, directory.partialPath)
  } finally {
    run?.progress.end()
  }
}

function checkStart({ from, loaded, model }: RunRequest, column: Column): void {
  if (from === null) return
  const { snapshot, layout } = from.saved
  if (layout !== JSON.stringify(model.stateLayoutDescription(column)))
    throw new InputError(
      `the states in ${from.directory} belong to another grid, other size classes or other nuclei than the scenario's`,
    )
  const { duration_s } = loaded.scenario
  if (snapshot.time_s >= duration_s)
    throw new InputError(
      `the run ends at ${formatTime(duration_s)}, so there is nothing to do after ${formatTime(snapshot.time_s)}; --set duration_h=... makes it longer`,
    )
}

async function openRun(
  request: RunRequest,
  start: Pick<Run, 'column' | 'directory'> & { startedAt: Date },
): Promise<Run> {
  const { loaded, model, from } = request
  const { scenario, document } = loaded
  const { column, directory, startedAt } = start
  const identity = runIdentity(scenario, request.identity, from?.saved.snapshot ?? null)
  const sizes = chooseSizeDistribution(scenario, document.output.size_distribution)
  return {
    request,
    column,
    directory,
    tables: openRunTables(directory.partialPath, {
      model,
      column,
      scenario,
      identity,
      writeSizes: sizes.write,
    }),
    progress: await request.begin({
      start_s: from?.saved.snapshot.time_s ?? 0,
      end_s: scenario.duration_s,
    }),
    stateInterval_s: document.output.state_every_h * 3600,
    unsaved: null,
    savedIntervals: -1,
    ending: {
      status: 'finished',
      identity,
      summary: model.summarise(column),
      solver: null,
      failure: null,
      notices: sizes.notice === null ? [] : [sizes.notice],
      startedAt,
    },
  }
}

/** Lets the model run to its end, or to the signal that stops it, which is returned. */
async function drive(run: Run): Promise<StopSignal | null> {
  const { request, column, progress } = run
  const events = request.model.simulate(column, request.from?.saved.snapshot)
  let turnStart = performance.now()
  let next: IteratorResult<SimulationEvent, SolverStatistics> = events.next()
  while (!next.done) {
    const event = next.value
    if (event.kind === 'state') take(run, event.snapshot)
    progress.reach(event.kind === 'state' ? event.snapshot.time_s : event.time_s)
    if (performance.now() - turnStart > LONGEST_TURN_MS) {
      await nextTurn()
      turnStart = performance.now()
    }
    const signal = request.stop.signal()
    if (signal !== null) return signal
    next = events.next()
  }
  run.ending.solver = next.value
  return null
}

/** Writes what one output time shows, and saves its state when one is due. */
function take(run: Run, snapshot: Snapshot): void {
  const diagnosis = run.request.model.diagnose(run.column, snapshot)
  run.tables.add(diagnosis)
  run.ending.summary.add(diagnosis)
  run.unsaved = snapshot
  const intervals = Math.floor(snapshot.time_s / run.stateInterval_s + ROUNDING)
  if (intervals <= run.savedIntervals) return
  run.savedIntervals = intervals
  saveState(run)
}

function saveState(run: Run): void {
  if (run.unsaved !== null) run.tables.addState(run.unsaved)
  run.unsaved = null
}

/** Completes the files in the partial directory. */
function complete(run: Run): RunRecord {
  saveState(run)
  run.tables.close()
  const record = makeRunRecord(run.request, run.column, run.ending)
  writeRunRecord(run.directory.partialPath, record)
  return record
}

function finish(run: Run, signal: StopSignal | null): RunOutcome {
  if (signal !== null) {
    run.ending.status = 'interrupted'
    run.ending.failure = signal
  }
  const record = complete(run)
  const { partialPath } = run.directory
  if (signal !== null) return { status: 'interrupted', directory: partialPath, record, signal }
  try {
    return { status: 'finished', directory: run.directory.publish(), record }
  } catch (error) {
    return { status: 'failed', directory: partialPath, error }
  }
}

function isSystemError(error: unknown): boolean {
  return error instanceof Error && 'syscall' in error
}

function fail(error: unknown, run: Run | null, partialPath: string): RunOutcome {
  const isEmpty = run === null || run.savedIntervals < 0
  if (error instanceof InputError && isEmpty) {
    run?.tables.abandon()
    rmSync(partialPath, { recursive: true, force: true })
    throw error
  }
  if (run === null || isSystemError(error)) {
    run?.tables.abandon()
    return { status: 'failed', directory: partialPath, error }
  }
  run.ending.status = 'failed'
  run.ending.failure = error instanceof Error ? error.message : String(error)
  try {
    complete(run)
  } catch {
    run.tables.abandon()
  }
  return { status: 'failed', directory: partialPath, error }
}
