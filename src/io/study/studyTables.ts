import { join } from 'node:path'
import { sensitivityTable } from '../../model/experiments/sensitivity.ts'
import { memberParameters, type Parameter, type StudyPlan } from '../../model/experiments/study.ts'
import { listField, type TableField, type TableMetadata } from '../arrow/tableField.ts'
import type { KeptResult } from './memberLine.ts'
import { type FoundMembers, readMember } from './memberStore.ts'
import { numberField, textField } from './unitOfName.ts'
import { type Row, writeRows } from './writeRows.ts'

/** Crashes after which a member is given up. */
export const MOST_CRASHES = 3

export interface StudyTables {
  plan: StudyPlan
  found: FoundMembers
  identity: string
}

/** The column of an axis: its key with what a column name does not allow replaced. */
function columnOfKey(key: string): string {
  return key.replaceAll(/[^A-Za-z0-9]+/g, '_')
}

function memberFields({ axes, diagnostics }: StudyPlan): TableField[] {
  return [
    numberField('member', 'place in the design, from 0'),
    ...axes.map(({ key, kind }) =>
      kind === 'number'
        ? numberField(columnOfKey(key), `the scenario's ${key}`)
        : textField(columnOfKey(key), `the scenario's ${key}`),
    ),
    textField('status', 'done, failed (the model could not go on) or crashed'),
    textField('reason', 'why it failed or crashed', true),
    ...diagnostics.map((name) => numberField(name, name.replaceAll('_', ' '))),
    numberField('evaluations', 'evaluations of the right-hand side'),
    numberField('accepted_steps', 'accepted steps of the integration'),
    numberField('largest_step_s', 'largest step of the integration'),
  ]
}

function endingOf(result: KeptResult | null, crash: string | null): Row {
  if (result?.status === 'done')
    return {
      status: 'done',
      reason: null,
      ...result.diagnostics,
      evaluations: result.solver.evaluations,
      accepted_steps: result.solver.acceptedSteps,
      largest_step_s: result.solver.largestStep_s,
    }
  if (result?.status === 'failed') return { status: 'failed', reason: result.reason }
  return { status: 'crashed', reason: crash }
}

function parameterColumns(parameters: Record<string, Parameter>): Row {
  return Object.fromEntries(
    Object.entries(parameters).map(([key, value]) => [columnOfKey(key), value]),
  )
}

/** Whether a member is not to be tried again: it has a result, or has crashed too often. */
export function isSettled({ finished, crashes }: FoundMembers, index: number): boolean {
  return finished.has(index) || (crashes.get(index)?.count ?? 0) >= MOST_CRASHES
}

/** The members that are there, one at a time, in the order of the design. */
function* settledMembers({ plan, found }: StudyTables) {
  for (let index = 0; index < plan.memberCount; index++)
    if (isSettled(found, index)) yield { index, result: readMember(found, index) }
}

function metadata(kind: string, { plan, identity }: StudyTables): TableMetadata {
  return [
    ['format', `mesofrost-${kind}`],
    ['format_version', '1'],
    ['title', plan.title],
    ['study_identity', identity],
  ]
}

/** Writes members.arrow and returns the diagnostics by place in the design, null where there are none. */
export function writeMembers(
  directory: string,
  tables: StudyTables,
): (Record<string, number | null> | null)[] {
  const { plan, found } = tables
  const results = new Array<Record<string, number | null> | null>(plan.memberCount).fill(null)
  const rows = function* (): Generator<Row> {
    for (const { index, result } of settledMembers(tables)) {
      if (result?.status === 'done') results[index] = result.diagnostics
      const ending = endingOf(result, found.crashes.get(index)?.reason ?? null)
      yield { member: index, ...parameterColumns(memberParameters(plan, index)), ...ending }
    }
  }
  const shape = { fields: memberFields(plan), metadata: metadata('members', tables) }
  writeRows(join(directory, 'members.arrow'), shape, absentAsNull(shape.fields, rows()))
  return results
}

function* absentAsNull(fields: TableField[], rows: Iterable<Row>): Generator<Row> {
  const empty = Object.fromEntries(fields.map(({ name }) => [name, null]))
  for (const row of rows) yield { ...empty, ...row }
}

const SENSITIVITY_FIELDS = [
  textField('measure', 'slope (of grids); first order or total (Sobol indices)'),
  textField('axis', 'key of the scenario that is varied'),
  textField('diagnostic', 'what responds'),
  textField('at', 'where the other axes stand; null over all of them', true),
  numberField('value', 'the slope or the index; null where there is no cloud'),
  numberField('low', 'least local slope, or lower end of the 95 % bootstrap interval'),
  numberField('high', 'greatest local slope, or upper end of the 95 % bootstrap interval'),
  textField('value_unit', 'what the value is counted in'),
  numberField('used', 'members that went in'),
  numberField('left_out', 'members without a cloud or a result'),
]

/** Writes sensitivity.arrow. */
export function writeSensitivity(
  directory: string,
  tables: StudyTables,
  results: readonly (Record<string, number | null> | null)[],
): void {
  const rows = sensitivityTable(tables.plan, results).map(
    ({ where, unit, ...row }): Row => ({ ...row, at: where, value_unit: unit }),
  )
  const shape = { fields: SENSITIVITY_FIELDS, metadata: metadata('sensitivity', tables) }
  writeRows(join(directory, 'sensitivity.arrow'), shape, rows)
}

function sceneFields(classes: number): TableField[] {
  return [
    numberField('member', 'place in the design, from 0'),
    numberField('time_h', 'time since the start of the run'),
    numberField('level', 'level, from 0 at the bottom'),
    numberField('altitude_km', 'resting altitude'),
    numberField('displaced_altitude_km', 'true altitude, as displaced by waves'),
    numberField('temperature_K', 'temperature'),
    numberField('pressure_Pa', 'pressure'),
    numberField('stretching', 'thickness of the displaced layer over that at rest'),
    listField(numberField('radius_nm', 'radius of each size class'), classes),
    listField(
      numberField('number_per_class_per_m3', 'ice particles per volume of air in each size class'),
      classes,
    ),
  ]
}

function* sceneRows(tables: StudyTables): Generator<Row> {
  for (const { index, result } of settledMembers(tables)) {
    if (result?.status !== 'done') continue
    for (const scene of result.scenes) {
      const classes = scene.radii_nm.length
      for (let level = 0; level < scene.altitude_km.length; level++)
        yield {
          member: index,
          time_h: scene.time_h,
          level,
          altitude_km: scene.altitude_km[level],
          displaced_altitude_km: scene.displaced_altitude_km[level],
          temperature_K: scene.temperature_K[level],
          pressure_Pa: scene.pressure_Pa[level],
          stretching: scene.stretching[level],
          radius_nm: scene.radii_nm,
          number_per_class_per_m3: scene.numberPerClass_per_m3.slice(
            level * classes,
            (level + 1) * classes,
          ),
        }
    }
  }
}

/** Writes scenes.arrow, the size distributions at the times that the study keeps. */
export function writeScenes(directory: string, tables: StudyTables): void {
  const shape = {
    fields: sceneFields(tables.plan.base.sizes.classes),
    metadata: metadata('scenes', tables),
  }
  writeRows(join(directory, 'scenes.arrow'), shape, sceneRows(tables))
}
