import { spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { tableFromIPC } from '@uwdata/flechette'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { brightnessVariables } from '../../src/model/diagnostics/brightness.ts'
import { budgetVariables } from '../../src/model/diagnostics/budget.ts'
import { type Diagnosis, diagnose, sizeVariables } from '../../src/model/diagnostics/diagnose.ts'
import { profileVariables } from '../../src/model/diagnostics/profileVariables.ts'
import type { Variable } from '../../src/model/diagnostics/variables.ts'
import { type Column, type Snapshot, simulate } from '../../src/model/simulate.ts'
import { builtProgram, ended } from '../bin/builtProgram.ts'
import { shippedColumn } from './shipped.ts'

/** Short and coarse; young ice has levels without a radius, which are null in the files. */
const SET = ['duration_h=3', 'grid.levels=40', 'sizes.classes=16', 'output.state_every_h=1']
const RUN = 'runs/quiet-night-001'
const SCRIPT = fileURLToPath(new URL('missingReaders.mjs', import.meta.url))
const README = fileURLToPath(new URL('../../README.md', import.meta.url))
const hasPyarrow = spawnSync(process.execPath, [SCRIPT], { stdio: 'ignore' }).status === 0

let place: string
let column: Column
let states: Snapshot[]
let moments: Diagnosis[]
beforeAll(async () => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost readers-'))
  const settings = SET.flatMap((setting) => ['--set', setting])
  const words = [builtProgram(), 'run', 'quiet-night', ...settings]
  const run = await ended(process.execPath, words, place)
  expect(run.code, run.stderr).toBe(0)
  column = shippedColumn('quiet-night', SET)
  states = [...simulate(column)].flatMap((event) =>
    event.kind === 'state' ? [event.snapshot] : [],
  )
  moments = states.map((snapshot) => diagnose(column, snapshot))
})
afterAll(() => rmSync(place, { recursive: true }))

type Cell = number | string | null
type Columns = Record<string, Cell[]>

const nullForNaN = (values: Iterable<number | string>): Cell[] =>
  Array.from(values, (value) => (Number.isNaN(value) ? null : value))

/** What the model computed in this process: per variable the values of all moments, one after the other. */
function computed(
  variables: Variable[],
  part: (moment: Diagnosis) => Record<string, Iterable<number | string>>,
): Columns {
  return Object.fromEntries(
    variables.map(({ name }) => [
      name,
      moments.flatMap((moment) => nullForNaN(part(moment)[name])),
    ]),
  )
}

/** What a reader with code of its own finds in a file; lists one after the other. */
function found(file: string): { columns: Columns; units: Record<string, string | undefined> } {
  const table = tableFromIPC(readFileSync(join(place, RUN, file)))
  const cells = (name: string) =>
    Array.from(table.getChild(name), (value): Cell[] =>
      value !== null && typeof value === 'object' ? [...value] : [value],
    ).flat()
  return {
    columns: Object.fromEntries(table.names.map((name) => [String(name), cells(String(name))])),
    units: Object.fromEntries(
      table.schema.fields.map((field) => [field.name, field.metadata?.get('unit')]),
    ),
  }
}

const unitsOf = (variables: Variable[]) =>
  Object.fromEntries(variables.map(({ name, unit }) => [name, unit]))

describe('an independent reader of Arrow files in JavaScript', () => {
  it('finds every number of the profiles', () => {
    const variables = profileVariables(column.scenario)
    const file = found('profiles.arrow')
    expect(file.columns).toEqual(computed(variables, ({ profiles }) => profiles))
    expect(file.units).toEqual(unitsOf(variables))
    expect(file.columns.mean_radius_nm).toContain(null)
  })

  it('finds every number of the size distribution', () => {
    const { columns, units } = found('size-distribution.arrow')
    expect(columns.number_per_class_per_m3).toEqual(
      moments.flatMap(({ numberPerClass }) => [...numberPerClass]),
    )
    expect(units).toEqual(unitsOf(sizeVariables(column.scenario)))
  })

  it('finds every number and name of the brightness', () => {
    const variables = brightnessVariables()
    const file = found('brightness.arrow')
    expect(file.columns).toEqual(computed(variables, ({ brightness }) => brightness))
    expect(file.units).toEqual(unitsOf(variables))
  })

  it('finds every number of the budget', () => {
    const variables = budgetVariables(column.scenario)
    const file = found('budget.arrow')
    const single = ({ budget }: Diagnosis) =>
      Object.fromEntries(Object.entries(budget).map(([name, value]) => [name, [value]]))
    expect(file.columns).toEqual(computed(variables, single))
    expect(file.units).toEqual(unitsOf(variables))
  })

  it('finds the states from which a run can go on', () => {
    const hourly = states.filter(({ time_s }) => time_s % 3600 === 0)
    const { columns } = found('state.arrow')
    expect(columns.time_s).toEqual([0, 3600, 7200, 10800])
    expect(columns.state).toEqual(hourly.flatMap(({ y }) => [...y]))
  })
})

/** Runs a text of Python beside the run directory. */
function python(text: string) {
  return spawnSync('python3', ['-c', text], { cwd: place, encoding: 'utf8' })
}

describe.skipIf(!hasPyarrow)('pyarrow', () => {
  it('reads the output by the lines that the README gives', () => {
    const reader = /```python\n([\s\S]*?)```/.exec(readFileSync(README, 'utf8'))?.[1] ?? ''
    expect(reader.trim().split('\n')).toHaveLength(5)
    const { status, stdout, stderr } = python(reader)
    expect(status, stderr).toBe(0)
    expect(stdout.trim()).not.toBe('')
  })

  it('finds the rows, columns, nulls and units of every file', () => {
    const text = `
import json, pyarrow as pa
for name in ('profiles', 'size-distribution', 'brightness', 'budget', 'state'):
    table = pa.ipc.open_file('${RUN}/' + name + '.arrow').read_all()
    table.validate(full=True)
    units = [field.metadata[b'unit'].decode() for field in table.schema]
    nulls = [column.null_count for column in table.columns]
    print(json.dumps([name, table.num_rows, table.column_names, nulls, units]))
`
    const { status, stdout, stderr } = python(text)
    expect(status, stderr).toBe(0)
    const told = stdout
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line))
    const wanted = told.map(([name]) => {
      const { numRows, names, schema, children } = tableFromIPC(
        readFileSync(join(place, RUN, `${name}.arrow`)),
      )
      const units = schema.fields.map((field) => field.metadata?.get('unit'))
      return [name, numRows, names, children.map(({ nullCount }) => nullCount), units]
    })
    expect(told).toHaveLength(5)
    expect(told).toEqual(wanted)
  })
})
