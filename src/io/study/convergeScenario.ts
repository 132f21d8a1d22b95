import { join } from 'node:path'
import {
  type ConvergencePlan,
  type ConvergenceRow,
  convergenceTable,
  planConvergence,
} from '../../model/experiments/convergence.ts'
import type { CommandContext } from '../command.ts'
import { type LoadedScenario, loadScenario } from '../scenario/loadScenario.ts'
import { textTable } from '../textTable.ts'
import {
  type Conclusion,
  conductExperiment,
  type ExperimentArguments,
  ExperimentFailure,
  failureOf,
} from './conductExperiment.ts'
import { fileStem } from './fileStem.ts'
import type { TaskEnd } from './memberWork.ts'
import { outcomeOf } from './outcomeOf.ts'
import { numberField, textField } from './unitOfName.ts'
import { type Row, writeRows } from './writeRows.ts'

export interface ConvergeArguments extends ExperimentArguments {
  scenario: string
  set: string[]
}

const mixed = (name: string, longName: string) => ({
  ...numberField(name, `${longName}, in the unit that the name of the diagnostic ends in`),
  unit: '',
})

const FIELDS = [
  textField('diagnostic', 'what is compared, with its unit'),
  textField('refinement', 'what is made finer: level spacing, class width, tolerance, or together'),
  mixed('base', 'as the scenario stands'),
  mixed('once', 'refined once'),
  mixed('twice', 'refined twice'),
  mixed('change', 'once less base'),
  numberField('relative_change', 'change over base'),
  numberField('order', 'observed order of convergence'),
  mixed('error_bar', 'error to be quoted with the base value'),
  numberField('relative_error_bar', 'error bar over base'),
  textField('verdict', 'converging, not asymptotic, unchanged, no cloud, or failed'),
]

/** Refines a scenario in turn and tells what each refinement does to every diagnostic. */
export async function convergeScenario(
  args: ConvergeArguments,
  context: CommandContext,
): Promise<number> {
  const loaded = loadScenario(args.scenario, {
    set: args.set,
    shippedDirectory: context.scenarioDirectory,
    workingDirectory: context.terminal.workingDirectory,
  })
  const plan = planConvergence(loaded.document)
  return conductExperiment(
    {
      kind: 'converge',
      name: `${fileStem(loaded.sourcePath)}-converge`,
      tasks: () =>
        plan.members.map(({ document }) => ({
          work: 'workMember',
          document,
          keep: { sceneTimes_h: [] },
        })),
      conclude: async (ends, partialPath) => conclude({ loaded, plan }, ends, partialPath),
    },
    args,
    context,
  )
}

function conclude(
  { loaded, plan }: { loaded: LoadedScenario; plan: ConvergencePlan },
  ends: readonly TaskEnd[],
  partialPath: string,
): Conclusion {
  const failures = plan.members.flatMap(({ words }, i) => {
    const reason = failureOf(ends[i])
    return reason === null ? [] : [`${words} failed: ${reason}`]
  })
  if (failures.length === plan.members.length) throw new ExperimentFailure(failures[0])
  const rows = convergenceTable(plan, ends.map(outcomeOf))
  const metadata: [string, string][] = [
    ['format', 'mesofrost-convergence'],
    ['format_version', '1'],
    ['title', loaded.title],
  ]
  writeRows(
    join(partialPath, 'convergence.arrow'),
    { fields: FIELDS, metadata },
    rows.map((row): Row => ({ ...row })),
  )
  const refined = plan.members.map(({ refinement, step, words }) => ({ refinement, step, words }))
  return {
    asked: { scenario: loaded.document, members: refined },
    found: { convergence: rows },
    text: `${loaded.title}\n${rowsText(rows)}`,
    warnings: failures,
    table: 'convergence.arrow',
    isPartial: failures.length > 0,
  }
}

function rowsText(rows: readonly ConvergenceRow[]): string {
  const numbers = (name: keyof ConvergenceRow) =>
    rows.map((row) => (row[name] as number | null) ?? Number.NaN)
  return textTable([
    { name: 'diagnostic', values: rows.map(({ diagnostic }) => diagnostic) },
    { name: 'refinement', values: rows.map(({ refinement }) => refinement) },
    { name: 'base', values: numbers('base') },
    { name: 'change', values: numbers('change') },
    { name: 'relative', values: numbers('relative_change') },
    { name: 'order', values: numbers('order') },
    { name: 'error bar', values: numbers('error_bar') },
    { name: 'verdict', values: rows.map(({ verdict }) => verdict) },
  ])
}
