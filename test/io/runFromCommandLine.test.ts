import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { readTable } from '../../src/io/arrow/tableReader.ts'
import { readRunRecord } from '../../src/io/runRecord.ts'
import { type Captured, captured } from './capturedTerminal.ts'

/** Small and quick; invented. A wave makes the air depend on time. */
const SCENARIO = `title: a small wave
duration_h: 2
grid: { levels: 20 }
sizes: { classes: 12 }
waves: [{ amplitude_K: 3, period_h: 1, vertical_wavelength_km: 10 }]
output: { state_every_h: 1 }
`

let place: string
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost go on-'))
  writeFileSync(join(place, 'small.yaml'), SCENARIO)
})
afterEach(() => rmSync(place, { recursive: true }))

async function run(...words: string[]): Promise<Captured> {
  const places = { workingDirectory: place, scenarioDirectory: join(place, 'none') }
  const done = await captured(['run', ...words], places)
  expect(done.code, done.stderr).toBe(0)
  return done
}

function sameFile(first: string, second: string, file: string): boolean {
  const [a, b] = [first, second].map((run) => readFileSync(join(place, run, file)))
  return a.equals(b)
}

describe('run --from', () => {
  it('goes on exactly as the whole run did', async () => {
    await run('small.yaml', '-o', 'whole')
    await run('--from', 'whole', '--at', '1h', '-o', 'rest')
    const whole = await readTable(join(place, 'whole', 'profiles.arrow'))
    const rest = await readTable(join(place, 'rest', 'profiles.arrow'))
    expect(rest.columns.time_h[0]).toBe(1)
    for (const { name } of whole.fields)
      expect(rest.columns[name], name).toEqual(whole.columns[name].slice(-rest.rows))
  })

  it('is itself repeated byte for byte from its run.json, its start included', async () => {
    await run('small.yaml', '-o', 'whole')
    await run('--from', 'whole', '--at', '1h', '--set', 'duration_h=3', '-o', 'rest')
    await run('rest/run.json', '-o', 'again')
    for (const file of readdirSync(join(place, 'rest')).filter((name) => name.endsWith('.arrow')))
      expect(sameFile('rest', 'again', file), file).toBe(true)
    expect(readRunRecord(join(place, 'again')).continuedFrom).toEqual({
      directory: 'whole',
      time_h: 1,
    })
  })
})

describe('run', () => {
  it('with --quiet says only where the output is', async () => {
    const { stdout, stderr } = await run('small.yaml', '--quiet')
    expect([stdout, stderr]).toEqual(['runs/small-001\n', ''])
  })

  it('with --json prints one object and keeps the rest on stderr', async () => {
    const { stdout } = await run('small.yaml', '--json')
    const result = JSON.parse(stdout)
    expect(result.status).toBe('finished')
    expect(result.directory).toBe(join(place, 'runs', 'small-001'))
    expect(result.identity).toMatch(/^[0-9a-f]{64}$/)
    expect(Object.keys(result.summary)).not.toHaveLength(0)
  })
})
