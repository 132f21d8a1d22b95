import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { basename, join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { readTable } from '../../src/io/arrow/tableReader.ts'
import { readRunRecord } from '../../src/io/runRecord.ts'
import { runScenario } from '../../src/io/runScenario.ts'
import { readSavedState } from '../../src/io/savedStates.ts'
import type { StopSignal } from '../../src/io/stopSignals.ts'
import { InputError, ModelError } from '../../src/model/errors.ts'
import { standInModel, standInRequest, standInScenario } from './standInModel.ts'

let place: string
beforeEach(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost-run-'))
})
afterEach(() => rmSync(place, { recursive: true }))

const FILES = [
  'brightness.arrow',
  'budget.arrow',
  'profiles.arrow',
  'run.json',
  'size-distribution.arrow',
  'state.arrow',
]

function arrowBytes(directory: string): Buffer[] {
  return FILES.filter((file) => file.endsWith('.arrow')).map((file) =>
    readFileSync(join(directory, file)),
  )
}

async function timesOf(file: string, name: string): Promise<number[]> {
  const { columns } = await readTable(join(place, file))
  return [...new Set(columns[name] as Float64Array)]
}

describe('a finished run', () => {
  it('leaves all its files, and nothing else, under the name asked for', async () => {
    const outcome = await runScenario(standInRequest(place))
    expect(outcome.status).toBe('finished')
    expect(readdirSync(place)).toEqual(['run'])
    expect(readdirSync(join(place, 'run'))).toEqual(FILES)
  })

  it('holds every output time, and the states at their own interval', async () => {
    await runScenario(standInRequest(place))
    expect(await timesOf('run/profiles.arrow', 'time_h')).toHaveLength(37)
    expect(await timesOf('run/budget.arrow', 'time_h')).toHaveLength(37)
    expect(await timesOf('run/state.arrow', 'time_s')).toEqual([0, 7200, 14_400, 21_600])
  })

  it('saves the final state even between two state times', async () => {
    const loaded = standInScenario({ duration_s: 5 * 3600 })
    await runScenario(standInRequest(place, { loaded }))
    expect(await timesOf('run/state.arrow', 'time_s')).toEqual([0, 7200, 14_400, 18_000])
  })

  it('keeps the clock out of the Arrow files: equal runs give equal bytes', async () => {
    const target = (out: string) => ({ ...standInRequest(place).target, out })
    await runScenario(standInRequest(place, { target: target('first') }))
    await runScenario(standInRequest(place, { target: target('second') }))
    expect(arrowBytes(join(place, 'second'))).toEqual(arrowBytes(join(place, 'first')))
  })

  it('records what was run and how it went', async () => {
    await runScenario(standInRequest(place))
    const record = readRunRecord(join(place, 'run'))
    expect(record).toMatchObject({
      format: 'mesofrost-run',
      status: 'finished',
      name: 'stand-in',
      scenario: standInScenario().document,
      continuedFrom: null,
      breakPoints_h: [0.5],
      solver: { evaluations: 7 },
      warnings: ['a warning'],
      summary: { outputs: 37, nothing: null },
      failure: null,
    })
    expect(record.identity.run).toMatch(/^[0-9a-f]{64}$/)
  })

  it('has the same identity whatever its title, and another when anything else differs', async () => {
    const identityOf = async (out: string, changes: object) => {
      const target = { ...standInRequest(place).target, out }
      await runScenario(standInRequest(place, { target, loaded: standInScenario(changes) }))
      return readRunRecord(join(place, out)).identity.run
    }
    const first = await identityOf('a', {})
    expect(await identityOf('b', { title: 'renamed' })).toBe(first)
    expect(await identityOf('c', { outputInterval_s: 1200 })).not.toBe(first)
  })

  it('writes the radii of the classes beside the numbers per class', async () => {
    await runScenario(standInRequest(place))
    const { metadata, fields } = await readTable(join(place, 'run/size-distribution.arrow'))
    expect(metadata.get('class_radii_nm')).toBe('[1,50]')
    expect(fields.at(-1)).toMatchObject({ name: 'number_per_class_per_m3', listLength: 2 })
  })

  it('leaves out a size distribution above 200 MB, and says which option writes it', async () => {
    const sizes = { classes: 50_000 } as never
    const grid = { levels: 1000 } as never
    const outcome = await runScenario(
      standInRequest(place, { loaded: standInScenario({ sizes, grid }) }),
    )
    expect(readdirSync(join(place, 'run'))).toEqual(
      FILES.filter((file) => file !== 'size-distribution.arrow'),
    )
    expect(outcome.status === 'finished' && outcome.record.warnings.at(-1)).toMatch(
      /left out because it would take 14801 MB; --set output.size_distribution=always/,
    )
  })
})

describe('a continued run', () => {
  it('goes on exactly from a saved state', async () => {
    await runScenario(standInRequest(place))
    const saved = await readSavedState(join(place, 'run'), 2 * 3600)
    const target = { ...standInRequest(place).target, out: 'onward' }
    await runScenario(standInRequest(place, { target, from: { directory: 'run', saved } }))
    const whole = await readSavedState(join(place, 'run'), 'last')
    expect(await readSavedState(join(place, 'onward'), 'last')).toEqual(whole)
    expect(await readSavedState(join(place, 'onward'), 'first')).toEqual(saved)
    expect(readRunRecord(join(place, 'onward')).continuedFrom).toEqual({
      directory: 'run',
      time_h: 2,
    })
  })

  it('refuses a time without a saved state and names those there are', async () => {
    await runScenario(standInRequest(place))
    await expect(readSavedState(join(place, 'run'), 3600)).rejects.toThrow(
      /has no state saved at 1 h; it has 0 h, 2 h, 4 h, 6 h/,
    )
  })

  it('refuses a state at or after the end, and one of another layout', async () => {
    await runScenario(standInRequest(place))
    const saved = await readSavedState(join(place, 'run'), 'last')
    const target = { ...standInRequest(place).target, out: 'onward' }
    const from = { directory: 'run', saved }
    await expect(runScenario(standInRequest(place, { target, from }))).rejects.toThrow(
      /the run ends at 6 h, so there is nothing to do after 6 h/,
    )
    const other = { directory: 'run', saved: { ...saved, layout: '{}' } }
    await expect(runScenario(standInRequest(place, { target, from: other }))).rejects.toThrow(
      /belong to another grid/,
    )
    expect(readdirSync(place)).toEqual(['run'])
  })
})

describe('a run that does not finish', () => {
  it('closes its files, keeps and names the partial directory when it is stopped', async () => {
    let asked: StopSignal | null = null
    const model = standInModel({
      beforeOutput: (time_s) => {
        if (time_s >= 3 * 3600) asked = 'SIGINT'
      },
    })
    const outcome = await runScenario(
      standInRequest(place, { model, stop: { signal: () => asked } }),
    )
    expect(outcome).toMatchObject({ status: 'interrupted', signal: 'SIGINT' })
    expect(readdirSync(place)).toEqual([basename(outcome.directory)])
    expect(readdirSync(outcome.directory)).toEqual(FILES)
    expect(readRunRecord(outcome.directory).status).toBe('interrupted')
    const { snapshot } = await readSavedState(outcome.directory, 'last')
    expect(snapshot.time_s).toBe(3 * 3600)
  })

  it('sees a signal that comes while the model works', async () => {
    const model = standInModel({
      beforeOutput: () => {
        const until = performance.now() + 10
        while (performance.now() < until);
      },
    })
    let asked: StopSignal | null = null
    setImmediate(() => {
      asked = 'SIGTERM'
    })
    const outcome = await runScenario(
      standInRequest(place, { model, stop: { signal: () => asked } }),
    )
    expect(outcome.status).toBe('interrupted')
  })

  it('keeps what was computed when the model fails', async () => {
    const failure = new ModelError('water vapour became NaN', {
      time_s: 3600,
      altitude_m: 83_000,
      quantity: 'water vapour',
    })
    const model = standInModel({
      beforeOutput: (time_s) => {
        if (time_s >= 3600) throw failure
      },
    })
    const outcome = await runScenario(standInRequest(place, { model }))
    expect(outcome).toMatchObject({ status: 'failed', error: failure })
    expect(existsSync(join(place, 'run'))).toBe(false)
    expect(readRunRecord(outcome.directory)).toMatchObject({
      status: 'failed',
      failure: 'water vapour became NaN',
    })
    const { snapshot } = await readSavedState(outcome.directory, 'last')
    expect(snapshot.time_s).toBe(3000)
  })

  it('leaves nothing behind when the scenario turns out to be bad input', async () => {
    const bad = standInModel()
    bad.prepareColumn = () => {
      throw new InputError('no air')
    }
    await expect(runScenario(standInRequest(place, { model: bad }))).rejects.toThrow('no air')
    expect(readdirSync(place)).toEqual([])
  })
})
