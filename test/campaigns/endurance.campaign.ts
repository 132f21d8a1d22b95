import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, afterEach, beforeEach, describe, expect, it } from 'vitest'
import { builtProgram, ended } from '../bin/builtProgram.ts'
import { printTable } from './printTable.ts'

let place: string
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost endurance-'))
})
afterEach(() => rmSync(place, { recursive: true }))

const rows: Record<string, string | number>[] = []
afterAll(() => printTable('Long runs of the default scenario, output every 10 min', rows))

const MEGABYTE = 1e6

/** Runs the default scenario in the built program, which leaves its largest resident memory in a file. */
async function endure(days: number, settings: string[]): Promise<number> {
  const report = `import { writeFileSync } from 'node:fs'
process.on('exit', () => writeFileSync('memory', String(process.resourceUsage().maxRSS)))`
  const run = await ended(
    process.execPath,
    [
      ...['--import', `data:text/javascript,${encodeURIComponent(report)}`, builtProgram()],
      ...['run', 'quiet-night', '-o', 'long', '--json', '--set', `duration_h=${24 * days}`],
      ...['output_every_min=10', ...settings].flatMap((setting) => ['--set', setting]),
    ],
    place,
  )
  expect(run.code, run.stderr).toBe(0)
  const { wallClock_s, summary } = JSON.parse(run.stdout)
  // The system counts in kibibytes.
  const memory = 1024 * Number(readFileSync(join(place, 'memory'), 'utf8'))
  const files = readdirSync(join(place, 'long')).map((file) => statSync(join(place, 'long', file)))
  rows.push({
    days,
    settings: settings.join(' ') || 'none',
    'memory, MB': Math.round(memory / MEGABYTE),
    'files, MB': Math.round(files.reduce((sum, { size }) => sum + size, 0) / MEGABYTE),
    'time, s': wallClock_s,
    'largest residual': summary.largest_budget_residual,
  })
  // Rounding of 1e-16 a step; a column that has become steady rounds the same way in each of some 1e5 steps.
  expect(summary.largest_budget_residual).toBeLessThan(1e-11)
  return memory
}

describe('the memory of a run stays below 400 MB', () => {
  it('for a day', async () => {
    expect(await endure(1, [])).toBeLessThan(400 * MEGABYTE)
  })

  it('for 100 days on a small grid with every size distribution written', async () => {
    const settings = ['grid.levels=60', 'sizes.classes=24', 'output.size_distribution=always']
    expect(await endure(100, settings)).toBeLessThan(400 * MEGABYTE)
  })

  it('for 100 days on the default grid', async () => {
    expect(await endure(100, [])).toBeLessThan(400 * MEGABYTE)
  })
})
