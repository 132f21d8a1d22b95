import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { setTimeout as pause } from 'node:timers/promises'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { randomStream } from '../../src/model/numerics/random.ts'
import { builtProgram, type Ended, ended } from '../bin/builtProgram.ts'
import { printTable } from './printTable.ts'

const RUNS = 20
const SEED = 20070624

/** The default night, longer and on a small grid: some seconds. */
const WORDS = [
  ...['run', 'quiet-night', '--set', 'duration_h=48', '--set', 'output_every_min=2'],
  ...['--set', 'grid.levels=60', '--set', 'sizes.classes=24', '-o', 'night'],
]

let place: string
let wanted: Map<string, Buffer>
let whole_ms: number

function run(meanwhile?: Parameters<typeof ended>[3]): Promise<Ended> {
  return ended(process.execPath, [builtProgram(), ...WORDS], place, meanwhile)
}

/** The Arrow files under the final name. */
function arrowFiles(): Map<string, Buffer> {
  const directory = join(place, 'night')
  const names = readdirSync(directory).filter((name) => name.endsWith('.arrow'))
  return new Map(names.sort().map((name) => [name, readFileSync(join(directory, name))]))
}

function expectWanted(): void {
  const files = arrowFiles()
  expect([...files.keys()]).toEqual([...wanted.keys()])
  for (const [name, bytes] of wanted) expect(files.get(name)?.equals(bytes), name).toBe(true)
}

beforeAll(async () => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost kill-'))
  const start = performance.now()
  const { code, stderr } = await run()
  whole_ms = performance.now() - start
  expect(code, stderr).toBe(0)
  wanted = arrowFiles()
})
beforeEach(() => {
  for (const name of readdirSync(place)) rmSync(join(place, name), { recursive: true })
})
afterAll(() => rmSync(place, { recursive: true }))

/** What must hold after a run was killed: nothing under the final name, and what is left was named. */
function expectOnlyNamedPartial(stderr: string): string[] {
  const left = readdirSync(place)
  expect(existsSync(join(place, 'night'))).toBe(false)
  expect(left.length).toBeLessThanOrEqual(1)
  for (const name of left) {
    expect(name).toMatch(/^\.night\.partial-[0-9a-f]{8}$/)
    expect(stderr).toContain(name)
  }
  return left
}

/** Repeats the run beside what a killed one left. */
async function expectRepeatSucceeds(): Promise<void> {
  const { code, stderr } = await run()
  expect(code, stderr).toBe(0)
  expectWanted()
}

describe('a run killed in the moment when its directory appears', () => {
  it('has named the directory', async () => {
    const { stderr } = await run(async (kill) => {
      while (readdirSync(place).length === 0) await pause(1)
      kill('SIGKILL')
    })
    expect(expectOnlyNamedPartial(stderr)).toHaveLength(1)
    await expectRepeatSucceeds()
  })
})

describe('runs killed at random times', () => {
  const random = randomStream(SEED)
  const rows: Record<string, string | number>[] = []
  afterAll(() => printTable('Killed runs', rows))

  const cases = Array.from({ length: RUNS }, (_, i) => ({
    signal: (i % 2 === 0 ? 'SIGKILL' : 'SIGINT') as NodeJS.Signals,
    share: random.uniform(),
  }))

  it.each(cases)(
    '$signal after $share of a run leaves nothing under the final name, and a repeat succeeds',
    async ({ signal, share }) => {
      const { code, stderr } = await run(async (kill) => {
        await pause(share * whole_ms)
        kill(signal)
      })
      rows.push({ signal, 'after ms': Math.round(share * whole_ms), code: code ?? 'none' })
      if (code === 0) {
        expectWanted()
        rmSync(join(place, 'night'), { recursive: true })
      } else {
        const [partial] = expectOnlyNamedPartial(stderr)
        // Before the directory is made there is nothing to close, and the signal may end the program at once.
        if (signal === 'SIGINT' && partial !== undefined) {
          expect(code).toBe(130)
          expect(stderr).toContain(
            `stopped by SIGINT; what was computed until then is in ${partial}`,
          )
        }
      }
      await expectRepeatSucceeds()
    },
  )
})
