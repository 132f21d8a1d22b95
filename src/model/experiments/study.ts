/** A study made ready: members are made one at a time, so that large studies take no memory. */
import { InputError } from '../errors.ts'
import { excludedBy } from '../scenario/alternatives.ts'
import { checkScenario } from '../scenario/checkScenario.ts'
import { complete } from '../scenario/complete.ts'
import { ScenarioError } from '../scenario/problems.ts'
import { resolve } from '../scenario/resolve.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import { outputTimes, prepareColumn } from '../simulate.ts'
import { HOUR } from '../units.ts'
import { type ChosenMembers, chooseMembers } from './chooseMembers.ts'
import type { Keep, MemberOutcome } from './runMember.ts'
import { setKey } from './setKey.ts'
import { type StudyAxis, studyAxis } from './studyAxis.ts'
import { diagnosticNames, lastHoursMeans } from './studyDiagnostics.ts'
import type { Study } from './studySchema.ts'

export type { StudyDesign } from './chooseMembers.ts'
export type { StudyAxis } from './studyAxis.ts'
export {
  parseStudy,
  type Study,
  type StudyInput,
  studyJsonSchema,
  studySchema,
} from './studySchema.ts'

/** The value of a varied key in a table; switches are the words true and false. */
export type Parameter = number | string

export interface StudyPlan extends ChosenMembers {
  title: string
  base: ScenarioDocument
  axes: StudyAxis[]
  seed: number
  /** Names of the diagnostics of a member, in the order of the table. */
  diagnostics: string[]
  /** Length of the mean over the last hours, h; null without one. */
  lastHoursMean: number | null
  keep: Keep
  /** What the user should know before it runs. */
  warnings: string[]
}

const MOST_MEMBERS = 100_000

/**
 * Plans a study of a complete scenario. Throws an InputError that names the nearest key, the member with a value outside
 * the range of its key, an empty design, or one of more than `maxMembers`.
 */
export function planStudy(
  study: Study,
  base: ScenarioDocument,
  { maxMembers = MOST_MEMBERS }: { maxMembers?: number } = {},
): StudyPlan {
  const axes = study.axes.map((axis) => studyAxis(axis, base))
  refuseClashes(axes)
  const plan: StudyPlan = {
    title: study.title,
    base,
    axes,
    ...chooseMembers(study, axes, maxMembers),
    seed: study.seed,
    diagnostics: diagnosticNames(base, study),
    lastHoursMean: study.last_hours_mean ?? null,
    keep: { sceneTimes_h: study.keep.scene_times_h },
    warnings: warningsOf(study),
  }
  checkTimes(plan)
  for (const index of tellingMembers(plan)) memberDocument(plan, index)
  return plan
}

/** Values of the varied keys of a member. */
export function memberParameters(plan: StudyPlan, index: number): Record<string, Parameter> {
  const values = plan.values(index)
  return Object.fromEntries(
    plan.axes.map(({ key }, axis) => {
      const value = values[axis]
      return [key, typeof value === 'boolean' ? String(value) : value]
    }),
  )
}

/** The complete, checked scenario of a member. Throws an InputError that names the member. */
export function memberDocument(plan: StudyPlan, index: number): ScenarioDocument {
  const values = plan.values(index)
  const written = plan.axes.reduce(
    (document, { key }, axis) => setKey(document, key, values[axis]),
    plan.base,
  )
  try {
    const document = complete(written)
    const problems = checkScenario(document)
    if (problems.length > 0) throw new ScenarioError(problems)
    return document
  } catch (error) {
    if (!(error instanceof InputError)) throw error
    const settings = plan.axes.map(({ key }, axis) => `${key} = ${values[axis]}`).join(', ')
    throw new InputError(`member ${index} (${settings}): ${error.message}`)
  }
}

/** The diagnostics that the study keeps of a finished member, by `plan.diagnostics`. */
export function memberDiagnostics(
  { diagnostics, lastHoursMean }: StudyPlan,
  outcome: Extract<MemberOutcome, { status: 'done' }>,
): Record<string, number | null> {
  const means = lastHoursMean === null ? {} : lastHoursMeans(outcome, lastHoursMean)
  const numbers = { ...outcome.diagnostics, ...means }
  return Object.fromEntries(diagnostics.map((name) => [name, numbers[name] ?? null]))
}

/** No key twice, and none that another one excludes. */
function refuseClashes(axes: readonly StudyAxis[]): void {
  for (const [i, { key }] of axes.entries()) {
    const [section, name] = splitKey(key)
    const clash = axes.find((other, j) => {
      const [otherSection, otherName] = splitKey(other.key)
      const excluded = otherSection === section && excludedBy(section, name).includes(otherName)
      return j !== i && (other.key === key || excluded)
    })
    if (clash === undefined) continue
    throw new InputError(`axes: ${key} and ${clash.key} exclude each other; expected one of them`)
  }
}

function splitKey(key: string): [section: string, name: string] {
  const cut = key.lastIndexOf('.')
  return [key.slice(0, Math.max(cut, 0)), key.slice(cut + 1)]
}

/** Members that show a value outside the range of its key: least, greatest and first broken number, first of each word. */
function tellingMembers(plan: StudyPlan): Set<number> {
  const found = plan.axes.map(() => new Map<string, { index: number; value: number }>())
  for (let index = 0; index < plan.memberCount; index++) {
    for (const [axis, value] of plan.values(index).entries()) {
      if (typeof value === 'number') {
        keepIf(found[axis], 'least', { index, value }, (kept) => value < kept)
        keepIf(found[axis], 'greatest', { index, value }, (kept) => value > kept)
        if (!Number.isInteger(value)) keepIf(found[axis], 'broken', { index, value }, () => false)
      } else {
        keepIf(found[axis], String(value), { index, value: 0 }, () => false)
      }
    }
  }
  return new Set([
    0,
    ...found.flatMap((members) => [...members.values()].map(({ index }) => index)),
  ])
}

function keepIf(
  members: Map<string, { index: number; value: number }>,
  name: string,
  candidate: { index: number; value: number },
  isBetter: (kept: number) => boolean,
): void {
  const kept = members.get(name)
  if (kept === undefined || isBetter(kept.value)) members.set(name, candidate)
}

const SAME_TIME_H = 1e-9

function checkTimes({ base, keep, lastHoursMean }: StudyPlan): void {
  if (lastHoursMean !== null && lastHoursMean > base.duration_h) {
    throw new InputError(
      `last_hours_mean: ${lastHoursMean} is not allowed; allowed: up to the length of the run, ${base.duration_h} h`,
    )
  }
  const outputs_h = [0, ...outputTimes(prepareColumn(resolve(base).scenario)).map((t) => t / HOUR)]
  const missing = keep.sceneTimes_h.find(
    (time) => !outputs_h.some((output) => Math.abs(output - time) < SAME_TIME_H),
  )
  if (missing === undefined) return
  throw new InputError(
    `keep.scene_times_h: no output at ${missing} h; output comes every ${base.output_every_min} min up to ${base.duration_h} h`,
  )
}

function warningsOf({ design, samples = 1 }: Study): string[] {
  const isPowerOfTwo = Number.isInteger(Math.log2(samples))
  return design === 'sobol' && !isPowerOfTwo
    ? [`${samples} samples do not fill the Sobol design evenly; a power of two does`]
    : []
}
