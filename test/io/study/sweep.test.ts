import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { readTable } from '../../../src/io/arrow/tableReader.ts'
import type { StopSignal } from '../../../src/io/stopSignals.ts'
import { assembleStudy } from '../../../src/io/study/assembleStudy.ts'
import type { MemberPool } from '../../../src/io/study/memberPool.ts'
import { findMembers } from '../../../src/io/study/memberStore.ts'
import { type MemberTask, type TaskEnd, workMember } from '../../../src/io/study/memberWork.ts'
import { runMembers } from '../../../src/io/study/runMembers.ts'
import { silentStudyProgress } from '../../../src/io/study/studyProgress.ts'
import { isSettled } from '../../../src/io/study/studyTables.ts'
import { parseStudy, planStudy, type StudyPlan } from '../../../src/model/experiments/study.ts'
import { complete } from '../../../src/model/scenario/complete.ts'

/** Small and quick; invented. */
const BASE = complete({ duration_h: 0.5, grid: { levels: 20 }, sizes: { classes: 12 } })
const IDENTITY = { name: 'mesofrost', version: '1.2.3', model: 'none', libraries: {} }
const FILES = ['members.arrow', 'scenes.arrow', 'sensitivity.arrow']

const plan = planStudy(
  parseStudy({
    title: 'a small study',
    axes: [
      { key: 'water.factor', list: [0.8, 1, 1.2, 1.5] },
      { key: 'temperature.offset_K', list: [-1, 1] },
    ],
    keep: { scene_times_h: [0.5] },
  }),
  BASE,
)

let place: string
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost sweep-'))
})
afterEach(() => rmSync(place, { recursive: true }))

/** Works in this thread. */
function nearPool(jobs: number, work: (task: MemberTask) => TaskEnd = workMember): MemberPool {
  return {
    jobs,
    run: async (task) => {
      await new Promise((resolve) => setImmediate(resolve))
      return work(task as MemberTask)
    },
    close: async () => {},
  }
}

/** One process's go at what is missing; returns the signal that stopped it. */
function goAt(
  directory: string,
  pool: MemberPool,
  { signal = () => null }: { signal?: () => StopSignal | null } = {},
  study: StudyPlan = plan,
) {
  const found = findMembers(directory)
  const all = Array.from({ length: study.memberCount }, (_, index) => index)
  return runMembers(
    all.filter((index) => !isSettled(found, index)),
    {
      plan: study,
      identity: IDENTITY,
      membersPath: directory,
      pool,
      stop: { signal },
      progress: silentStudyProgress,
    },
  )
}

function assembled(directory: string, study: StudyPlan = plan) {
  const found = findMembers(directory)
  const tally = assembleStudy(directory, { plan: study, found, identity: 'none' })
  return { tally, files: FILES.map((file) => readFileSync(join(directory, file))) }
}

function directoryFor(name: string): string {
  return mkdtempSync(join(place, name))
}

describe('a sweep', () => {
  it('gives equal files at one and at three jobs, in one go and after a crash and a stop', async () => {
    const one = directoryFor('one')
    await goAt(one, nearPool(1))
    const whole = assembled(one)
    expect(whole.tally).toEqual({ members: 8, done: 8, failed: 0, crashed: 0, missing: [] })

    const other = directoryFor('other')
    let begun = 0
    let worked = 0
    const near = nearPool(3, (task) =>
      worked++ === 1 ? { kind: 'crashed', reason: 'a stand-in' } : workMember(task),
    )
    const hanging: MemberPool = {
      ...near,
      // The stop comes while the others are being worked on.
      run: (task) => (begun++ < 5 ? near.run(task) : new Promise(() => {})),
    }
    const signal = () => (worked === 5 ? ('SIGINT' as const) : null)
    expect(await goAt(other, hanging, { signal })).toBe('SIGINT')
    const left = findMembers(other)
    expect([left.finished.size, left.crashes.size]).toEqual([4, 1])
    await goAt(other, nearPool(3))
    expect(readdirSync(other)).toHaveLength(2)
    expect(assembled(other).files).toEqual(whole.files)
  })

  it('has a row per member with parameters, diagnostics, status and solver counts', async () => {
    await goAt(place, nearPool(1))
    assembled(place)
    const { columns, rows, fields } = await readTable(join(place, 'members.arrow'))
    expect(rows).toBe(8)
    expect([...columns.member]).toEqual([0, 1, 2, 3, 4, 5, 6, 7])
    expect([...columns.water_factor]).toEqual([0.8, 0.8, 1, 1, 1.2, 1.2, 1.5, 1.5])
    expect([...columns.temperature_offset_K]).toEqual([-1, 1, -1, 1, -1, 1, -1, 1])
    expect(new Set<unknown>(columns.status)).toEqual(new Set(['done']))
    expect(fields.find(({ name }) => name === 'column_ice_ug_per_m2')?.unit).toBe('ug m-2')
    const direct = workMember({ work: 'workMember', document: plan.base, keep: plan.keep })
    if (direct.kind !== 'finished' || direct.outcome.status !== 'done') throw new Error('not done')
    // Members 2 and 3 have the water of the base, a kelvin below and above it.
    const [cool, warm] = [2, 3].map((row) => columns.column_ice_ug_per_m2[row])
    const between = direct.outcome.diagnostics.column_ice_ug_per_m2
    expect(cool).toBeGreaterThan(between as number)
    expect(warm).toBeLessThan(between as number)
    expect(Math.min(...(columns.evaluations as Float64Array))).toBeGreaterThan(0)
  })

  it('keeps the size distributions that are asked for', async () => {
    await goAt(place, nearPool(1))
    assembled(place)
    const { columns, rows } = await readTable(join(place, 'scenes.arrow'))
    expect(rows).toBe(8 * 20)
    expect(columns.number_per_class_per_m3).toHaveLength(8 * 20 * 12)
    expect(new Set<unknown>(columns.time_h)).toEqual(new Set([0.5]))
    expect(Math.max(...(columns.number_per_class_per_m3 as Float64Array))).toBeGreaterThan(0)
  })

  it('keeps a failure of the model as a result, with its reason', async () => {
    const failing = nearPool(1, () => ({
      kind: 'finished',
      outcome: { status: 'failed', reason: 'at 0.3 h: not finite' },
    }))
    await goAt(place, failing)
    await goAt(
      place,
      nearPool(1, () => {
        throw new Error('it must not be tried again')
      }),
    )
    expect(assembled(place).tally).toMatchObject({ done: 0, failed: 8 })
    const { columns } = await readTable(join(place, 'members.arrow'))
    expect(new Set<unknown>(columns.reason)).toEqual(new Set(['at 0.3 h: not finite']))
    expect(Number.isNaN(columns.column_ice_ug_per_m2[0])).toBe(true)
  })

  it('tries a crashed member three times in all, then reports it', async () => {
    const crashing = nearPool(2, ({ document }) =>
      document.water.factor === 1
        ? { kind: 'crashed', reason: 'gone' }
        : workMember({ work: 'workMember', document, keep: plan.keep }),
    )
    for (const missing of [2, 2, 0]) {
      await goAt(place, crashing)
      const { tally } = assembled(place)
      expect(tally.missing).toHaveLength(missing)
    }
    expect(assembled(place).tally).toMatchObject({ done: 6, crashed: 2, missing: [] })
    const { columns } = await readTable(join(place, 'members.arrow'))
    expect(columns.status.slice(2, 4)).toEqual(['crashed', 'crashed'])
    expect(columns.reason[2]).toBe('gone')
  })

  it('assembles what is there of an unfinished study', async () => {
    let done = 0
    await goAt(
      place,
      nearPool(1, (task) => (done++ < 3 ? workMember(task) : { kind: 'crashed', reason: 'gone' })),
    )
    expect(assembled(place).tally).toMatchObject({ done: 3, missing: [3, 4, 5, 6, 7] })
    const { columns } = await readTable(join(place, 'members.arrow'))
    expect([...columns.member]).toEqual([0, 1, 2])
  })

  it('ends with bad input when a member turns out to be impossible', async () => {
    const refusing = nearPool(1, () => ({ kind: 'refused', message: 'no such thing' }))
    await expect(goAt(place, refusing)).rejects.toThrow('member 0: no such thing')
  })
})
