import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs'
import { tmpdir } from 'node:os'
import { basename, dirname, join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { createRunDirectory, type RunTarget } from '../../src/io/runDirectory.ts'
import { InputError } from '../../src/model/errors.ts'

let place: string
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost runs '))
})
afterEach(() => rmSync(place, { recursive: true }))

function target(changes: Partial<RunTarget> = {}): RunTarget {
  return {
    out: null,
    force: false,
    scenarioName: 'quiet-night',
    workingDirectory: place,
    ...changes,
  }
}

/** Makes a run directory with one file that holds a text. */
function finishedRun(changes: Partial<RunTarget>, text = '{"format":"mesofrost-run"}'): string {
  const directory = createRunDirectory(target(changes))
  writeFileSync(join(directory.partialPath, 'run.json'), text)
  return directory.publish()
}

describe('createRunDirectory', () => {
  it('takes the next free number of the scenario, counting on from the highest', () => {
    expect(finishedRun({})).toBe(join(place, 'runs', 'quiet-night-001'))
    expect(finishedRun({})).toBe(join(place, 'runs', 'quiet-night-002'))
    mkdirSync(join(place, 'runs', 'quiet-night-1041'))
    mkdirSync(join(place, 'runs', 'quiet-night-wet-2000'))
    expect(finishedRun({})).toBe(join(place, 'runs', 'quiet-night-1042'))
  })

  it('shows nothing under the final name before it is published, and nothing else after', () => {
    const directory = createRunDirectory(target({ out: 'here' }))
    expect(basename(directory.partialPath)).toMatch(/^\.here\.partial-[0-9a-f]{8}$/)
    expect(dirname(directory.partialPath)).toBe(place)
    expect(existsSync(join(place, 'here'))).toBe(false)
    directory.publish()
    expect(readdirSync(place)).toEqual(['here'])
  })

  it('lets two runs of one scenario go on at once', () => {
    const first = createRunDirectory(target())
    const second = createRunDirectory(target())
    expect([second.publish(), first.publish()].map((path) => basename(path))).toEqual([
      'quiet-night-001',
      'quiet-night-002',
    ])
  })

  it('refuses a name that is taken', () => {
    finishedRun({ out: 'taken' })
    expect(() => createRunDirectory(target({ out: 'taken' }))).toThrow(
      /taken exists already; give another --out, or --force/,
    )
    expect(readdirSync(place)).toEqual(['taken'])
  })

  it('replaces the output of an earlier run when forced', () => {
    finishedRun({ out: 'again' }, '{"format":"mesofrost-run","old":true}')
    finishedRun({ out: 'again', force: true }, '{"format":"mesofrost-run","new":true}')
    expect(readFileSync(join(place, 'again', 'run.json'), 'utf8')).toContain('new')
    expect(readdirSync(place)).toEqual(['again'])
  })

  it.each([
    [
      'a directory of somebody else',
      (path: string) => {
        mkdirSync(path)
        writeFileSync(join(path, 'thesis.tex'), 'years of work')
      },
    ],
    [
      'a directory whose run.json is not ours',
      (path: string) => {
        mkdirSync(path)
        writeFileSync(join(path, 'run.json'), '{"format":"other"}')
      },
    ],
    ['a file', (path: string) => writeFileSync(path, 'text')],
    ['a link', (path: string) => symlinkSync('nowhere', path)],
  ])('never replaces %s, even when forced', (_what, make) => {
    make(join(place, 'mine'))
    expect(() => createRunDirectory(target({ out: 'mine', force: true }))).toThrow(InputError)
    expect(() => createRunDirectory(target({ out: 'mine' }))).toThrow(/exists already/)
    expect(readdirSync(place)).toEqual(['mine'])
  })

  it('keeps the partial directory when the name was taken during the run', () => {
    const directory = createRunDirectory(target({ out: 'late' }))
    mkdirSync(join(place, 'late'))
    writeFileSync(join(place, 'late', 'file'), '')
    expect(() => directory.publish()).toThrow(/exists already/)
    expect(existsSync(directory.partialPath)).toBe(true)
  })

  it('fills an empty directory that is there already', () => {
    mkdirSync(join(place, 'empty'))
    finishedRun({ out: 'empty' })
    expect(readdirSync(join(place, 'empty'))).toEqual(['run.json'])
  })

  it('refuses a place where no directory can be made', () => {
    writeFileSync(join(place, 'file'), '')
    expect(() => createRunDirectory(target({ out: 'file/inside' }))).toThrow(InputError)
    expect(() => createRunDirectory(target({ out: ' ' }))).toThrow('--out needs the name')
  })

  it('turns a scenario name into the name of one directory', () => {
    expect(basename(finishedRun({ scenarioName: '../été/my night' }))).toBe('été-my-night-001')
    expect(basename(finishedRun({ scenarioName: '..' }))).toBe('run-001')
  })
})
