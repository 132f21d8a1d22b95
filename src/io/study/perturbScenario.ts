import { extname, resolve as resolvePath } from 'node:path'
import { InputError } from '../../model/errors.ts'
import {
  type Change,
  changedDocument,
  describePerturbations,
  parseChange,
} from '../../model/experiments/change.ts'
import {
  alignedPair,
  compareHeadlines,
  onsetOf,
  summariseResponse,
  tightened,
} from '../../model/experiments/comparison.ts'
import type { Headlines } from '../../model/experiments/headlines.ts'
import { resolve } from '../../model/scenario/resolve.ts'
import type { ScenarioDocument } from '../../model/scenario/schema.ts'
import type { CommandContext } from '../command.ts'
import type { ModelIdentity } from '../modelIdentity.ts'
import { type LoadedScenario, loadScenario } from '../scenario/loadScenario.ts'
import { parsePlacedYaml } from '../scenario/parsePlacedYaml.ts'
import { plain } from '../scenario/placedValue.ts'
import { readTextFile } from '../scenario/readTextFile.ts'
import { warn } from '../terminal.ts'
import {
  type Conclusion,
  conductExperiment,
  type Experiment,
  type ExperimentArguments,
  ExperimentFailure,
  failureOf,
} from './conductExperiment.ts'
import { fileStem } from './fileStem.ts'
import type { RunTask, StudyTask, TaskEnd } from './memberWork.ts'
import { readHeadlines } from './readHeadlines.ts'
import { type Response, summaryText, writeResponses } from './responseTables.ts'

export interface PerturbArguments extends ExperimentArguments {
  scenario: string
  changes: string[]
  set: string[]
}

/** The control and the changed scenarios, made comparable. */
interface Comparison {
  loaded: LoadedScenario
  changes: Change[]
  control: ScenarioDocument
  changed: ScenarioDocument[]
  identity: ModelIdentity
}

const FILE_ENDINGS = ['.yaml', '.yml', '.json']

/** A change in its short form, or from a file with perturbations as a scenario has them. */
export function readChange(text: string, workingDirectory: string): Change {
  if (!FILE_ENDINGS.includes(extname(text))) return parseChange(text)
  const path = resolvePath(workingDirectory, text)
  const origin = { source: text, directory: workingDirectory, line: 1, column: 1 }
  const content = plain(parsePlacedYaml(readTextFile(path, text, 'change'), origin))
  const list = Array.isArray(content)
    ? content
    : (content as { perturbations?: unknown } | null)?.perturbations
  if (!Array.isArray(list) || list.length === 0)
    throw new InputError(
      `change ${text}: expected a list of perturbations as in a scenario, or the key perturbations with one`,
    )
  const perturbations = list.map((one) => ({ time: { shape: 'always' }, ...one }))
  return { text, words: describePerturbations(perturbations), perturbations }
}

/** Runs a scenario without and with each change and tells the response. */
export async function perturbScenario(
  args: PerturbArguments,
  context: CommandContext,
): Promise<number> {
  const { terminal, scenarioDirectory, identity } = context
  if (args.changes.length === 0)
    throw new InputError('give at least one --change, such as --change temperature:-1K@82..84km')
  const loaded = loadScenario(args.scenario, {
    set: args.set,
    shippedDirectory: scenarioDirectory,
    workingDirectory: terminal.workingDirectory,
  })
  const changes = args.changes.map((text) => readChange(text, terminal.workingDirectory))
  const documents = changes.map((change) => changedDocument(loaded.document, change))
  const comparison = { loaded, changes, identity, ...alignedPair(loaded.document, documents) }
  if (!args.quiet) {
    for (const warning of loaded.warnings) warn(terminal, `warning: ${warning}`)
    for (const { text, words } of changes) warn(terminal, `${text}: ${words}`)
  }
  return conductExperiment(perturbation(comparison), args, context)
}

function perturbation(comparison: Comparison): Experiment {
  return {
    kind: 'perturb',
    name: `${fileStem(comparison.loaded.sourcePath)}-perturb`,
    tasks: (partialPath) => tasksOf(comparison, partialPath),
    conclude: (ends, partialPath) => conclude(comparison, ends, partialPath),
  }
}

/** Names of the directories of the changed runs. */
function changedNames({ changes }: Comparison): string[] {
  return changes.length === 1 ? ['changed'] : changes.map((_, i) => `changed-${i + 1}`)
}

/** The tighter runs first, because they take longest: control, changed ones; then the runs themselves likewise. */
function tasksOf(comparison: Comparison, workingDirectory: string): StudyTask[] {
  const { control, changed, loaded, identity } = comparison
  const documents = [control, ...changed]
  const names = ['control', ...changedNames(comparison)]
  const runs = documents.map((document, i): RunTask => {
    const target = { out: names[i], force: false, scenarioName: names[i], workingDirectory }
    return {
      work: 'workRun',
      loaded: { ...loaded, document, ...resolve(document) },
      target,
      identity,
    }
  })
  const tight = documents.map(
    (document): StudyTask => ({
      work: 'workMember',
      document: tightened(document),
      keep: { sceneTimes_h: [] },
    }),
  )
  return [...tight, ...runs]
}

/** The headlines of a run: read back from its directory, or as the thread returned them; null where it failed. */
async function headlinesOf(end: TaskEnd): Promise<Headlines | null> {
  if (end.kind === 'written') return readHeadlines(end.directory)
  return end.kind === 'finished' && end.outcome.status === 'done' ? end.outcome.headlines : null
}

async function conclude(
  comparison: Comparison,
  ends: readonly TaskEnd[],
  partialPath: string,
): Promise<Conclusion> {
  const { changes } = comparison
  const count = changes.length + 1
  const [tight, runs] = [ends.slice(0, count), ends.slice(count)]
  const [control, ...changed] = await Promise.all(runs.map(headlinesOf))
  const [tightControl, ...tightChanged] = await Promise.all(tight.map(headlinesOf))
  if (control === null) throw new ExperimentFailure(`the control failed: ${failureOf(runs[0])}`)
  const responses = changes.flatMap((change, i): Response[] => {
    const one = changed[i]
    if (one === null) return []
    const tightOne = tightChanged[i]
    const floor =
      tightControl === null || tightOne === null
        ? undefined
        : { control: tightControl, changed: tightOne }
    const rows = compareHeadlines(control, one, floor)
    const summary = summariseResponse(rows, onsetOf(change.perturbations))
    return [{ change: change.text, rows, summary }]
  })
  const failures = failuresOf(comparison, ends)
  if (responses.length === 0) throw new ExperimentFailure(failures.join('; '))
  writeResponses(partialPath, responses)
  return conclusion(comparison, responses, failures)
}

function failuresOf({ changes }: Comparison, ends: readonly TaskEnd[]): string[] {
  const names = ['the control', ...changes.map(({ text }) => text)]
  const all = [...names.map((name) => `${name}, run tightly`), ...names]
  return ends.flatMap((end, i) => {
    const reason = failureOf(end)
    return reason === null ? [] : [`${all[i]}, failed: ${reason}`]
  })
}

function conclusion(
  { changes, control, loaded }: Comparison,
  responses: readonly Response[],
  failures: string[],
): Conclusion {
  const texts = responses.map(({ change, summary }) => {
    const words = changes.find(({ text }) => text === change)?.words ?? change
    return `${words}\n${summaryText(summary)}`
  })
  return {
    asked: {
      scenario: control,
      changes: changes.map(({ text, words }) => ({ text, words })),
    },
    found: { responses: responses.map(({ change, summary }) => ({ change, summary })) },
    text: `${loaded.title}\n\n${texts.join('\n')}`,
    warnings: failures,
    table: 'response.arrow',
    isPartial: failures.length > 0,
  }
}
