import { mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { randomStream } from '../../src/model/numerics/random.ts'
import type { Ended } from '../bin/builtProgram.ts'
import {
  finalBytes,
  linesIn,
  sweep,
  sweepOnFullDisk,
  sweepUntil,
  sweepWithCrashes,
  writeStudy,
} from '../support/brokenSweep.ts'
import { printTable } from './printTable.ts'

/** Interruptions in all; after every few the sweep is finished and compared byte by byte. */
const INTERRUPTIONS = 200
const PER_SWEEP = 10

const { uniform: random } = randomStream(20261201)
let place: string
let reference: Buffer[]
/** How long the whole sweep takes, so that kills fall anywhere in it. */
let whole_ms: number
beforeAll(async () => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost kills-'))
  writeStudy(place)
  const start = performance.now()
  const { code, stderr } = await sweep(place, '-o', 'reference', '--jobs', '2')
  expect(code, stderr).toBe(0)
  whole_ms = performance.now() - start
  reference = finalBytes(join(place, 'reference'))
})
afterAll(() => {
  rmSync(place, { recursive: true })
  printTable(
    'Interruptions',
    Object.entries(tally).map(([way, counts]) => ({ way, ...counts })),
  )
})

type Way = 'SIGKILL' | 'SIGINT' | 'SIGTERM' | 'full disk' | 'exit' | 'throw' | 'memory'

const WAYS: Way[] = ['SIGKILL', 'SIGINT', 'SIGTERM', 'full disk', 'exit', 'throw', 'memory']
const tally: Record<string, { times: number; 'too late': number }> = {}

/** Exit codes that each way may end with; null is a process that was killed. 0 when it came too late. */
const CODES: Record<Way, (number | null)[]> = {
  SIGKILL: [null, 0, 3],
  SIGINT: [130, null, 0, 3],
  SIGTERM: [143, null, 0, 3],
  'full disk': [1, 0, 3],
  exit: [0, 3],
  throw: [0, 3],
  memory: [0, 3],
}

function interrupted(way: Way, out: string): Promise<Ended> {
  if (way === 'full disk') return sweepOnFullDisk(place, out, Math.ceil(1 + 80 * random()))
  if (way === 'exit' || way === 'throw' || way === 'memory')
    return sweepWithCrashes(place, out, way, 0.05)
  const when =
    random() < 0.5
      ? { lines: Math.ceil(4 * random()) }
      : { milliseconds: 0.7 * whole_ms * random() }
  return sweepUntil(place, out, way, when)
}

/** Goes on with a sweep until it is done, compares its files and clears it away. */
async function finish(out: string): Promise<void> {
  const { code, stderr } = await sweep(place, '-o', out, '--retry')
  expect(code, stderr).toBe(0)
  expect(finalBytes(join(place, out))).toEqual(reference)
  const hidden = readdirSync(join(place, out)).filter((name) => name.startsWith('.'))
  // A killed process may leave what it was just writing under such a name; nothing else.
  expect(hidden.filter((name) => !name.includes('.partial-'))).toEqual([])
  rmSync(join(place, out), { recursive: true })
}

describe('a sweep that is interrupted again and again', () => {
  it.each(Array.from({ length: INTERRUPTIONS / PER_SWEEP }, (_, i) => `sweep-${i}`))(
    '%s ends with the same bytes',
    async (out) => {
      for (let i = 0; i < PER_SWEEP; i++) {
        const way = WAYS[Math.floor(random() * WAYS.length)]
        const before = linesIn(join(place, out))
        const { code, stderr } = await interrupted(way, out)
        expect(CODES[way], `${way}: ${stderr}`).toContain(code)
        expect(linesIn(join(place, out))).toBeGreaterThanOrEqual(before)
        tally[way] ??= { times: 0, 'too late': 0 }
        tally[way].times++
        if (code !== 0) continue
        tally[way]['too late']++
        await finish(out)
      }
      await finish(out)
    },
  )
})
