import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { readTable } from '../../src/io/arrow/tableReader.ts'
import { type Captured, captured } from '../io/capturedTerminal.ts'
import { builtProgram } from './builtProgram.ts'

/** Small and quick; invented. The worker threads are those of the compiled program. */
const SMALL = `title: a small night
duration_h: 1
grid: { levels: 20 }
sizes: { classes: 12 }
`
const PULSE = `perturbations:
  - quantity: temperature
    add_K: -1
    altitude: { from_km: 82, to_km: 88 }
    time: { shape: pulse, start_h: 0.25, end_h: 0.6 }
`

let place: string
let memberWorker: string
beforeAll(async () => {
  memberWorker = join(dirname(builtProgram()), 'memberWorker.js')
  place = mkdtempSync(join(tmpdir(), 'mesofrost asking-'))
  writeFileSync(join(place, 'small.yaml'), SMALL)
  writeFileSync(join(place, 'pulse.yaml'), PULSE)
  await say(
    'perturb',
    'small.yaml',
    '--change',
    'temperature:-1K@82..88km@0.25..0.6h',
    '-o',
    'cool',
  )
}, 60_000)
afterAll(() => rmSync(place, { recursive: true }))

async function say(...words: string[]): Promise<Captured> {
  const places = { workingDirectory: place, scenarioDirectory: join(place, 'none'), memberWorker }
  const done = await captured(words, places)
  expect(done.code, done.stderr).toBe(0)
  return done
}

function bytes(...path: string[]): Buffer {
  return readFileSync(join(place, ...path))
}

/** A table without the identity of the run, which is in its metadata. */
async function content(...path: string[]) {
  const { columns, rows } = await readTable(join(place, ...path))
  return { columns, rows }
}

const TABLES = ['profiles', 'brightness', 'budget', 'size-distribution', 'state']

describe('perturb', () => {
  it('writes both runs, the response and what was asked', async () => {
    expect(readdirSync(join(place, 'cool')).sort()).toEqual(
      ['changed', 'control', 'experiment.json', 'response.arrow'].sort(),
    )
    const { asked, found } = JSON.parse(bytes('cool', 'experiment.json').toString())
    expect(asked.changes[0].words).toBe(
      'temperature lowered by 1 K between 82 and 88 km, from 0.25 to 0.6 h',
    )
    const ice = found.responses[0].summary[0]
    expect(ice.quantity).toBe('column_ice_ug_per_m2')
    // Cooler air holds less vapour: more ice, far above the error of the integration.
    expect(ice.largest).toBeGreaterThan(10 * ice.floor)
    expect(ice.above_floor).toBe(true)
  })

  it('has a row per time, quantity and channel that adds up', async () => {
    const { columns } = await content('cool', 'response.arrow')
    const [control, changed, difference] = ['control', 'changed', 'difference'].map(
      (name) => columns[name] as Float64Array,
    )
    expect(difference).toEqual(changed.map((value, row) => value - control[row]))
    expect(new Set<unknown>(columns.time_h).size).toBe(7)
    expect(columns.channel[0]).toBe('')
    expect(new Set<unknown>(columns.channel)).toEqual(new Set(['', '260nm', '532nm', '355nm']))
  })

  it('gives for a change of nothing two runs with equal bytes, and no response', async () => {
    const nothing = ['--change', 'temperature:+0K@80..85km@0.2..0.7h', '--change', 'water:x1']
    await say('perturb', 'small.yaml', ...nothing, '-o', 'nothing')
    for (const table of TABLES)
      for (const changed of ['changed-1', 'changed-2'])
        expect(bytes('nothing', changed, `${table}.arrow`), table).toEqual(
          bytes('nothing', 'control', `${table}.arrow`),
        )
    const { columns } = await content('nothing', 'response.arrow')
    const differences = [...(columns.difference as Float64Array)].filter(Number.isFinite)
    expect(new Set(differences)).toEqual(new Set([0]))
  })

  it('equals a run of the scenario with the change written into it', async () => {
    writeFileSync(join(place, 'changed.yaml'), SMALL + PULSE)
    await say('run', 'changed.yaml', '-o', 'written')
    for (const table of TABLES)
      expect(await content('written', `${table}.arrow`), table).toEqual(
        await content('cool', 'changed', `${table}.arrow`),
      )
  })

  it('takes the change from a file too', async () => {
    await say('perturb', 'small.yaml', '--change', 'pulse.yaml', '-o', 'from-file', '--jobs', '1')
    expect(await content('from-file', 'changed', 'profiles.arrow')).toEqual(
      await content('cool', 'changed', 'profiles.arrow'),
    )
  })

  it('replaces its own output when forced, and says in JSON where it is', async () => {
    const words = ['perturb', 'small.yaml', '--change', 'water:+1%', '-o', 'again']
    await say(...words)
    const { stdout } = await say(...words, '--force', '--json', '--quiet')
    const { status, directory, responses } = JSON.parse(stdout)
    expect([status, directory]).toEqual(['finished', join(place, 'again')])
    expect(responses[0].change).toBe('water:+1%')
    expect(readdirSync(place).filter((name) => name.startsWith('.'))).toEqual([])
  })
})

describe('compare', () => {
  it('tells the same of two runs as the command that made them', async () => {
    await say('compare', 'cool/control', 'cool/changed', '--floor', '-o', 'compared')
    const { change: _, ...compared } = (await content('compared', 'response.arrow')).columns
    const { change: __, ...perturbed } = (await content('cool', 'response.arrow')).columns
    expect(compared).toEqual(perturbed)
  })

  it('refuses runs with other output times', async () => {
    await say('run', 'small.yaml', '--set', 'output_every_min=20', '-o', 'seldom')
    const places = { workingDirectory: place, scenarioDirectory: place, memberWorker }
    const { code, stderr } = await captured(['compare', 'cool/control', 'seldom'], places)
    expect(code).toBe(2)
    expect(stderr).toContain('the output times differ')
  })
})

describe('response-map', () => {
  const lattice = ['--bands', '84..88/4km', '--onsets', '0.25h', '--duration', '0.25h']

  it('agrees with a direct perturbation of the same cell', async () => {
    await say('response-map', 'small.yaml', ...lattice, '--amount', '+0.5K', '-o', 'map')
    const map = (await content('map', 'response-map.arrow')).columns
    const change = 'temperature:+0.5K@84..88km@0.25..0.5h'
    await say('perturb', 'small.yaml', '--change', change, '-o', 'direct')
    const { columns } = await content('direct', 'response.arrow')
    const rows = [...columns.quantity.keys()].filter(
      (row) => columns.quantity[row] === 'albedo_per_sr' && columns.channel[row] === '260nm',
    )
    const last = rows[rows.length - 1]
    const ratio = (columns.changed[last] as number) / (columns.control[last] as number)
    const cell = [...map.quantity.keys()].find(
      (row) => map.quantity[row] === 'albedo_per_sr' && map.channel[row] === '260nm',
    )
    // The same two runs: only rounding lies between them.
    expect(map.response[cell as number]).toBeCloseTo(Math.log(ratio) / 0.5, 12)
  })

  it('gives equal bytes with one thread and with two', async () => {
    await say('response-map', 'small.yaml', ...lattice, '-o', 'map-1', '--jobs', '1')
    await say('response-map', 'small.yaml', ...lattice, '-o', 'map-2', '--jobs', '2')
    expect(bytes('map-1', 'response-map.arrow').equals(bytes('map-2', 'response-map.arrow'))).toBe(
      true,
    )
  })
})

describe('converge', () => {
  it('tells for every diagnostic what each refinement does', async () => {
    await say('converge', 'small.yaml', '-o', 'converged')
    const { columns } = await content('converged', 'convergence.arrow')
    const refinements = ['level spacing', 'class width', 'tolerance', 'together']
    expect(new Set<unknown>(columns.refinement)).toEqual(new Set(refinements))
    const ice = [...columns.diagnostic.keys()].find(
      (row) =>
        columns.diagnostic[row] === 'column_ice_ug_per_m2' &&
        columns.refinement[row] === 'tolerance',
    ) as number
    const relative = Math.abs(columns.relative_change[ice] as number)
    // The tolerance is 1e-3, and tightening it moves the ice by less.
    expect(relative).toBeLessThan(1e-3)
  })
})
