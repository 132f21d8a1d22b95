import {
  appendFileSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import fc from 'fast-check'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { openMemberFile } from '../../../src/io/study/memberFile.ts'
import { type MemberRecord, memberLine, readMemberLine } from '../../../src/io/study/memberLine.ts'
import { findMembers, readMember } from '../../../src/io/study/memberStore.ts'

let place: string
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost members-'))
})
afterEach(() => rmSync(place, { recursive: true }))

function member(index: number, brightness = index): MemberRecord {
  const solver = { evaluations: 7, acceptedSteps: 3, largestStep_s: 0.1 + index }
  const result = {
    status: 'done' as const,
    diagnostics: { brightness, none: null },
    scenes: [],
    solver,
  }
  return { kind: 'member', index, key: `key ${index}`, result }
}

/** A file of one process with these records; returns its path. */
function written(records: MemberRecord[]): string {
  const before = new Set(readdirSync(place))
  const file = openMemberFile(place)
  for (const record of records) file.append(record)
  file.close()
  const [name] = readdirSync(place).filter((entry) => !before.has(entry))
  return join(place, name)
}

function crash(index: number): MemberRecord {
  return { kind: 'crash', index, key: `key ${index}`, reason: 'out of memory' }
}

describe('a file of members', () => {
  it('returns what was put in, to the last digit', () => {
    written([member(3, 0.1 + 0.2), member(0, 5e-324)])
    const found = findMembers(place)
    expect([...found.finished.keys()].sort()).toEqual([0, 3])
    expect(readMember(found, 3)).toMatchObject({
      diagnostics: { brightness: 0.1 + 0.2, none: null },
    })
    expect(readMember(found, 0)).toMatchObject({ diagnostics: { brightness: 5e-324 } })
    expect(readMember(found, 1)).toBeNull()
  })

  it('says first who wrote it, and appears with its first line', () => {
    const file = openMemberFile(place)
    expect(readdirSync(place)).toEqual([])
    file.append(member(0))
    expect(readdirSync(place)).toHaveLength(1)
    file.close()
    expect([...findMembers(place).writers]).toEqual([
      `Node ${process.version} on ${process.platform}-${process.arch}`,
    ])
  })

  it('has each line on the way to the disk before the next member ends', () => {
    const file = openMemberFile(place)
    for (const index of [0, 1, 2]) {
      file.append(member(index))
      expect(findMembers(place).finished.size).toBe(index + 1)
    }
    file.close()
  })

  it('loses only the last line when it is torn anywhere', () => {
    const path = written([member(0), member(1), member(2)])
    const whole = readFileSync(path)
    const lastStart = whole.lastIndexOf('\n', whole.length - 2) + 1
    for (let length = lastStart; length < whole.length; length++) {
      writeFileSync(path, whole.subarray(0, length))
      const found = findMembers(place)
      expect([...found.finished.keys()]).toEqual([0, 1])
      expect(found.damagedLines).toBe(0)
    }
  })

  it('counts a damaged line as missing and reads on behind it', () => {
    const path = written([member(0), member(1), member(2)])
    const lines = readFileSync(path, 'utf8').split('\n')
    lines[2] = lines[2].replace('"brightness":1', '"brightness":2')
    writeFileSync(path, lines.join('\n'))
    const found = findMembers(place)
    expect([...found.finished.keys()]).toEqual([0, 2])
    expect(found.damagedLines).toBe(1)
  })

  it('reads lines that are longer than its chunks', () => {
    const long = member(0)
    if (long.kind !== 'member' || long.result.status !== 'done') throw new Error('not done')
    long.result.diagnostics = Object.fromEntries(
      Array.from({ length: 50_000 }, (_, i) => [`number ${i}`, i / 7]),
    )
    written([long, member(1)])
    const found = findMembers(place)
    expect(readMember(found, 0)).toEqual(long.result)
    expect(found.finished.has(1)).toBe(true)
  })
})

describe('the files of several processes', () => {
  it('merge members that were done twice with equal results', () => {
    written([member(0), member(1)])
    written([member(1), member(2)])
    expect(findMembers(place).finished.size).toBe(3)
  })

  it('are refused when a member came out differently', () => {
    const first = written([member(0), member(1)])
    const second = written([member(1, 1 + Number.EPSILON)])
    expect(() => findMembers(place)).toThrow(/member 1 came out differently in/)
    expect(() => findMembers(place)).toThrow(first)
    expect(() => findMembers(place)).toThrow(second)
  })

  it('count the crashes of a member, whoever saw them', () => {
    written([crash(4), member(0), crash(4)])
    written([crash(4)])
    expect(findMembers(place).crashes.get(4)).toEqual({ count: 3, reason: 'out of memory' })
  })

  it('tell of different Node versions', () => {
    written([member(0)])
    const other = memberLine({ kind: 'process', node: 'v99.0.0', platform: 'other' })
    appendFileSync(join(place, 'other.jsonl'), other)
    expect(findMembers(place).writers.size).toBe(2)
  })

  it('are only those that end in .jsonl', () => {
    writeFileSync(join(place, 'notes.txt'), memberLine(member(0)))
    expect(findMembers(place).finished.size).toBe(0)
  })
})

describe('a line', () => {
  it('comes back as it was, and not when a letter is changed', () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true }),
        fc.string(),
        fc.nat(),
        (number, text, place) => {
          const record = { ...member(0, number === 0 ? 0 : number), key: text } as MemberRecord
          const line = memberLine(record).slice(0, -1)
          expect(readMemberLine(line)?.record).toEqual(record)
          const at = place % line.length
          const changed = `${line.slice(0, at)}${line[at] === 'x' ? 'y' : 'x'}${line.slice(at + 1)}`
          expect(readMemberLine(changed)).toBeNull()
        },
      ),
      { seed: 1, numRuns: 300 },
    )
  })
})
