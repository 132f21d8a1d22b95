import { mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import {
  FINAL_FILES,
  finalBytes,
  linesIn,
  MEMBERS,
  sweep,
  sweepOnFullDisk,
  sweepUntil,
  sweepWithCrashes,
  writeStudy,
} from '../support/brokenSweep.ts'
import { builtProgram, ended } from './builtProgram.ts'

let place: string
let reference: Buffer[]
beforeAll(async () => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost sweeps-'))
  writeStudy(place)
  const { code, stderr } = await sweep(place, '-o', 'reference', '--jobs', '1', '--quiet')
  expect(code, stderr).toBe(0)
  reference = finalBytes(join(place, 'reference'))
}, 60_000)
afterAll(() => rmSync(place, { recursive: true }))

function gather(out: string) {
  return ended(process.execPath, [builtProgram(), 'sweep-gather', out], place)
}

describe('mesofrost sweep', () => {
  it('survives kill -9, Ctrl-C, crashed threads and a full disk, and then ends as ever', async () => {
    const directory = join(place, 'broken')
    const killed = await sweepUntil(place, 'broken', 'SIGKILL', { lines: 3 })
    expect(killed.code).toBeNull()
    const stopped = await sweepUntil(place, 'broken', 'SIGINT', { lines: 3 })
    expect(stopped.code, stopped.stderr).toBe(130)
    expect(stopped.stderr).toContain(
      'stopped by SIGINT; the members that were done by then are kept',
    )
    expect(stopped.stderr).toContain('to go on: the same command with --out broken')
    const crashed = await sweepWithCrashes(place, 'broken', 'throw', 1)
    expect(crashed.code, crashed.stderr).toBe(3)
    expect(crashed.stderr).toContain('the same command with --out tries again, up to 3 times')
    const full = await sweepOnFullDisk(place, 'broken', 24)
    expect(full.code, full.stderr).toBe(1)
    expect(full.stderr).toContain('the disk is full or a file grows too large')
    expect(readdirSync(directory).filter((name) => FINAL_FILES.includes(name))).toEqual([])
    const done = linesIn(directory)

    const finished = await sweep(place, '-o', 'broken')
    expect(finished.code, finished.stderr).toBe(0)
    expect(finished.stdout).toContain(`${MEMBERS} of ${MEMBERS} members done`)
    expect(done).toBeGreaterThan(6)
    expect(finalBytes(directory)).toEqual(reference)
  })

  it('is done by several processes at once in one directory, and gathered', async () => {
    const early = await sweep(place, '-o', 'shared', '--part', '3/3')
    expect(early.code, early.stderr).toBe(0)
    expect(early.stdout).toContain('mesofrost sweep-gather shared')
    const partial = await gather('shared')
    expect(partial.code).toBe(3)
    expect(partial.stderr).toContain('missing: 0-1, 3-4, 6-7')
    const parts = await Promise.all(
      ['1/3', '2/3', '2/3'].map((part) => sweep(place, '-o', 'shared', '--part', part)),
    )
    expect(parts.map(({ code }) => code)).toEqual([0, 0, 0])
    const whole = await gather('shared')
    expect(whole.code, whole.stderr).toBe(0)
    expect(finalBytes(join(place, 'shared'))).toEqual(reference)
  })

  it('refuses the directory of another study and loses nothing', async () => {
    const before = linesIn(join(place, 'reference'))
    const words = ['-o', 'reference', '--set', 'water.factor=2']
    const { code, stderr } = await sweep(place, ...words)
    expect(code).toBe(2)
    expect(stderr).toContain('belongs to another study: the scenario it starts from differs')
    expect(linesIn(join(place, 'reference'))).toBe(before)
    expect(finalBytes(join(place, 'reference'))).toEqual(reference)
  })
})
