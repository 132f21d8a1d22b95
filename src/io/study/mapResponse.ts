import { join } from 'node:path'
import {
  planResponseMap,
  type ResponseMapOptions,
  type ResponseMapPlan,
  type ResponseMapRow,
  responseMapTable,
} from '../../model/experiments/responseMap.ts'
import type { CommandContext } from '../command.ts'
import { type LoadedScenario, loadScenario } from '../scenario/loadScenario.ts'
import { warn } from '../terminal.ts'
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

export interface ResponseMapArguments extends ExperimentArguments {
  scenario: string
  set: string[]
  /** What the lattice is, given the length of the run. */
  options(duration_h: number): ResponseMapOptions
}

/** The headline on the screen; the file has all quantities and channels. */
const SHOWN_QUANTITY = 'albedo_per_sr'

const FIELDS = [
  numberField('band_bottom_km', 'lower edge of the band that is perturbed'),
  numberField('band_top_km', 'upper edge of the band that is perturbed'),
  numberField('onset_h', 'when the perturbation sets in'),
  textField('quantity', 'the brightness that responds'),
  textField('channel', 'name of the channel'),
  numberField('response', 'd ln(brightness) per unit of the perturbation; null where flagged'),
  textField('per', 'unit that the response is counted per'),
  numberField('floor', 'numerical floor of the response, from tighter runs'),
  numberField('nonlinearity', 'relative difference from twice the response to half the change'),
  textField('flagged', 'below floor, no cloud, or failed; null where the response counts', true),
]

/** Maps where and when a scenario's brightness responds to a small change. */
export async function mapResponse(
  args: ResponseMapArguments,
  context: CommandContext,
): Promise<number> {
  const { terminal, scenarioDirectory } = context
  const loaded = loadScenario(args.scenario, {
    set: args.set,
    shippedDirectory: scenarioDirectory,
    workingDirectory: terminal.workingDirectory,
  })
  const options = args.options(loaded.document.duration_h)
  const plan = planResponseMap(loaded.document, options)
  if (!args.quiet) warn(terminal, plan.words)
  return conductExperiment(
    {
      kind: 'response-map',
      name: `${fileStem(loaded.sourcePath)}-response-map`,
      tasks: () =>
        plan.members.map(({ document }) => ({
          work: 'workMember',
          document,
          keep: { sceneTimes_h: [] },
        })),
      conclude: async (ends, partialPath) => conclude({ loaded, plan, options }, ends, partialPath),
    },
    args,
    context,
  )
}

interface ResponseMap {
  loaded: LoadedScenario
  plan: ResponseMapPlan
  options: ResponseMapOptions
}

function conclude(
  { loaded, plan, options }: ResponseMap,
  ends: readonly TaskEnd[],
  partialPath: string,
): Conclusion {
  const control = failureOf(ends[plan.members.findIndex(({ role }) => role === 'control')])
  if (control !== null) throw new ExperimentFailure(`the control failed: ${control}`)
  const failures = ends.flatMap((end) => failureOf(end) ?? [])
  const rows = responseMapTable(plan, ends.map(outcomeOf))
  const metadata: [string, string][] = [
    ['format', 'mesofrost-response-map'],
    ['format_version', '1'],
    ['title', loaded.title],
    ['words', plan.words],
    ['when', JSON.stringify(plan.when)],
  ]
  writeRows(
    join(partialPath, 'response-map.arrow'),
    { fields: FIELDS, metadata },
    rows.map((row): Row => ({ ...row })),
  )
  return {
    asked: { scenario: plan.control, ...options, when: plan.when, words: plan.words },
    found: { cells: plan.cells.length, per: plan.per, flagged: countFlagged(rows) },
    text: `${loaded.title}\n${plan.words}\n${rowsText(rows)}`,
    warnings: failures.length === 0 ? [] : [`${failures.length} runs failed: ${failures[0]}`],
    table: 'response-map.arrow',
    isPartial: failures.length > 0,
  }
}

function countFlagged(rows: readonly ResponseMapRow[]): number {
  return rows.filter(({ flagged }) => flagged !== null).length
}

function rowsText(rows: readonly ResponseMapRow[]): string {
  const shown = rows.filter(
    ({ quantity, channel }) => quantity === SHOWN_QUANTITY && channel === rows[0].channel,
  )
  const numbers = (name: keyof ResponseMapRow) =>
    shown.map((row) => (row[name] as number | null) ?? Number.NaN)
  return textTable([
    { name: 'from_km', values: numbers('band_bottom_km') },
    { name: 'to_km', values: numbers('band_top_km') },
    { name: 'onset_h', values: numbers('onset_h') },
    { name: `${rows[0].channel} per ${rows[0].per}`, values: numbers('response') },
    { name: 'floor', values: numbers('floor') },
    { name: 'nonlinearity', values: numbers('nonlinearity') },
    { name: 'flagged', values: shown.map(({ flagged }) => flagged ?? '') },
  ])
}
