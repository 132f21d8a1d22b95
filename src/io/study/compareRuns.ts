import { resolve } from 'node:path'
import { InputError } from '../../model/errors.ts'
import {
  compareHeadlines,
  summariseResponse,
  tightened,
} from '../../model/experiments/comparison.ts'
import type { CommandContext } from '../command.ts'
import { type RunRecord, readRunRecord } from '../runRecord.ts'
import {
  type Conclusion,
  conductExperiment,
  type ExperimentArguments,
  failureOf,
} from './conductExperiment.ts'
import type { StudyTask, TaskEnd } from './memberWork.ts'
import { readHeadlines } from './readHeadlines.ts'
import { summaryText, writeResponses } from './responseTables.ts'

export interface CompareArguments extends ExperimentArguments {
  /** The run that is compared against. */
  control: string
  changed: string
  /** Whether the numerical floor is measured by running both again, more tightly. */
  floor: boolean
}

/** The response table of any two runs with equal output times. */
export async function compareRuns(
  args: CompareArguments,
  context: CommandContext,
): Promise<number> {
  const paths = [args.control, args.changed].map((path) =>
    resolve(context.terminal.workingDirectory, path),
  )
  const records = paths.map(readRunRecord)
  const [control, changed] = await Promise.all(paths.map(readHeadlines))
  // Before anything is written or run: they may not be comparable at all.
  compareHeadlines(control, changed)
  const conclude = async (ends: readonly TaskEnd[], partialPath: string): Promise<Conclusion> => {
    const [tightControl, tightChanged] = ends.map(headlinesOf)
    const floor =
      tightControl && tightChanged ? { control: tightControl, changed: tightChanged } : undefined
    const rows = compareHeadlines(control, changed, floor)
    const summary = summariseResponse(rows)
    const change = `${args.changed} against ${args.control}`
    writeResponses(partialPath, [{ change, rows, summary }])
    const failures = ends.flatMap((end) => failureOf(end) ?? [])
    return {
      asked: { control: args.control, changed: args.changed },
      found: { summary },
      text: `${change}\n${summaryText(summary)}`,
      warnings: failures.map((reason) => `a tighter run failed: ${reason}`),
      table: 'response.arrow',
      isPartial: failures.length > 0,
    }
  }
  const tasks = args.floor ? records.map(tightTask) : []
  return conductExperiment(
    { kind: 'compare', name: 'compare', tasks: () => tasks, conclude },
    args,
    context,
  )
}

function tightTask({ scenario, continuedFrom, name }: RunRecord): StudyTask {
  if (continuedFrom !== null)
    throw new InputError(
      `--floor: ${name} goes on from a saved state, so it cannot be run again by itself`,
    )
  return { work: 'workMember', document: tightened(scenario), keep: { sceneTimes_h: [] } }
}

function headlinesOf(end: TaskEnd) {
  return end.kind === 'finished' && end.outcome.status === 'done' ? end.outcome.headlines : null
}
