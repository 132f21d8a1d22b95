import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { openStudyDirectory, type StudyTarget } from '../../../src/io/study/studyDirectory.ts'
import {
  createStudyRecord,
  STUDY_FORMAT,
  type StudyRecord,
} from '../../../src/io/study/studyRecord.ts'
import { parseStudy } from '../../../src/model/experiments/study.ts'
import { complete } from '../../../src/model/scenario/complete.ts'

let place: string
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost studies-'))
})
afterEach(() => rmSync(place, { recursive: true }))

const AXES = [{ key: 'water.factor', list: [1, 2] }]

function record(changes: Partial<StudyRecord> = {}): StudyRecord {
  return {
    format: STUDY_FORMAT,
    formatVersion: 1,
    name: 'wet',
    study: parseStudy({ axes: AXES }),
    base: complete({}),
    model: { name: 'mesofrost', version: '1.2.3', model: 'none', libraries: {} },
    ...changes,
  }
}

function target(changes: Partial<StudyTarget> = {}): StudyTarget {
  return { out: 'study', force: false, workingDirectory: place, ...changes }
}

/** A study that has begun, with a file of members. */
function begun(): string {
  const { path, membersPath } = openStudyDirectory(target(), record())
  writeFileSync(join(membersPath, 'some.jsonl'), 'a member')
  return path
}

describe('openStudyDirectory', () => {
  it('makes the directory with study.json and a place for the members', () => {
    const { path } = openStudyDirectory(target(), record())
    expect(readdirSync(path).sort()).toEqual(['members', 'study.json'])
    expect(JSON.parse(readFileSync(join(path, 'study.json'), 'utf8'))).toEqual(record())
  })

  it('takes the next free number without a name', () => {
    const one = openStudyDirectory(target({ out: null }), record())
    const two = openStudyDirectory(target({ out: null }), record())
    expect([one.path, two.path]).toEqual([
      join(place, 'runs', 'wet-001'),
      join(place, 'runs', 'wet-002'),
    ])
  })

  it('goes on with the same study, whatever its file and title are called', () => {
    const path = begun()
    const study = parseStudy({ title: 'a new title', question: 'why?', axes: AXES })
    const base = { ...complete({}), title: 'another' }
    expect(openStudyDirectory(target(), record({ name: 'renamed', study, base })).path).toBe(path)
    expect(readdirSync(join(path, 'members'))).toEqual(['some.jsonl'])
  })

  it.each([
    ['the study', { study: parseStudy({ axes: AXES, seed: 2 }) }],
    ['the scenario it starts from', { base: complete({ duration_h: 12 }) }],
    [
      'the program',
      { model: { name: 'mesofrost', version: '1.2.4', model: 'none', libraries: {} } },
    ],
  ])('refuses the directory when %s differs, and loses nothing', (part, change) => {
    const path = begun()
    expect(() => openStudyDirectory(target(), record(change))).toThrow(
      `belongs to another study: ${part} differs; give another --out, or --force`,
    )
    expect(readdirSync(join(path, 'members'))).toEqual(['some.jsonl'])
  })

  it('throws another study away when forced', () => {
    const path = begun()
    openStudyDirectory(target({ force: true }), record({ base: complete({ duration_h: 12 }) }))
    expect(readdirSync(join(path, 'members'))).toEqual([])
    expect(readdirSync(place)).toEqual(['study'])
  })

  it.each([false, true])('never takes a directory of something else (--force %s)', (force) => {
    mkdirSync(join(place, 'study'))
    writeFileSync(join(place, 'study', 'thesis.tex'), 'years of work')
    expect(() => openStudyDirectory(target({ force }), record())).toThrow(/something else/)
    writeFileSync(join(place, 'study', 'study.json'), '{"format":"other"}')
    expect(() => openStudyDirectory(target({ force }), record())).toThrow(/not a record of a/)
    writeFileSync(join(place, 'file'), 'text')
    expect(() => openStudyDirectory(target({ out: 'file', force }), record())).toThrow(
      /not a direc/,
    )
    expect(existsSync(join(place, 'study', 'thesis.tex'))).toBe(true)
  })

  it('joins a directory that another process is just making', () => {
    mkdirSync(join(place, 'study', 'members'), { recursive: true })
    writeFileSync(join(place, 'study', '.study.json.partial-01234567'), '{"form')
    expect(openStudyDirectory(target(), record()).path).toBe(join(place, 'study'))
  })
})

describe('createStudyRecord', () => {
  it('succeeds once and leaves a standing record alone', () => {
    expect(createStudyRecord(place, record())).toBe(true)
    expect(createStudyRecord(place, record({ name: 'late' }))).toBe(false)
    expect(readdirSync(place)).toEqual(['study.json'])
    expect(JSON.parse(readFileSync(join(place, 'study.json'), 'utf8')).name).toBe('wet')
  })
})
