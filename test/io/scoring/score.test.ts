import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { Writable } from 'node:stream'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { scalarFields } from '../../../src/io/arrow/tableField.ts'
import { readTable } from '../../../src/io/arrow/tableReader.ts'
import { TableWriter } from '../../../src/io/arrow/tableWriter.ts'
import { scoreCommand } from '../../../src/io/commands/score.ts'
import { variable } from '../../../src/model/diagnostics/variables.ts'
import { randomStream } from '../../../src/model/numerics/random.ts'

/** All tables invented. */
let place: string
beforeAll(() => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost score-'))
  file('truth.csv', 'scene_id,ice_ug_per_m2,radius_nm', 'a,1,30', 'b,2,40', 'c,3,', 'd,4,50')
  file(
    'mine.csv',
    'scene_id,ice_ug_per_m2,ice_ug_per_m2_uncertainty,radius_nm,flag',
    'd,3,,50,ok',
    'a,2,1,30,ok',
    'c,5,1,99,ok',
    'b,2,0.5,,ok',
  )
})
afterAll(() => rmSync(place, { recursive: true }))

function file(name: string, ...lines: string[]): void {
  writeFileSync(join(place, name), `${lines.join('\n')}\n`)
}

function collector(texts: string[]): Writable {
  return new Writable({
    write(chunk, _encoding, done) {
      texts.push(String(chunk))
      done()
    },
  })
}

async function score(estimates: string, options: Record<string, unknown> = {}) {
  const stdout: string[] = []
  const stderr: string[] = []
  const code = await scoreCommand.run(
    {
      estimates,
      truth: 'truth.csv',
      threshold: [],
      bins: [],
      seed: '1',
      resamples: '50',
      ...options,
    },
    {
      terminal: {
        stdout: collector(stdout),
        stderr: collector(stderr),
        workingDirectory: place,
        calledAs: 'mesofrost',
      },
      scenarioDirectory: place,
      memberWorker: 'none',
      identity: { name: 'mesofrost', version: '1.2.3', model: 'none', libraries: {} },
      watchStopSignals: () => ({ signal: () => null, release() {} }),
    },
  )
  return { code, stdout: stdout.join(''), stderr: stderr.join('') }
}

function scoresIn(directory: string) {
  return JSON.parse(readFileSync(join(place, directory, 'scores.json'), 'utf8'))
}

describe('mesofrost score', () => {
  it('writes the scores that one works out by hand', async () => {
    const { code, stdout } = await score('mine.csv', {
      out: 'by-hand',
      threshold: ['ice_ug_per_m2=3'],
      bins: ['ice_ug_per_m2=3'],
    })
    expect(code).toBe(0)
    expect(stdout).toContain('ice_ug_per_m2: 4 scenes, 4 estimates, 3 with uncertainty\n  bias ')
    expect(stdout).toContain('look at it with: mesofrost show by-hand/residuals.arrow --csv')
    expect(readdirSync(join(place, 'by-hand')).toSorted()).toEqual([
      'experiment.json',
      'residuals.arrow',
      'scores.json',
    ])
    const { quantities, scenes, confidence } = scoresIn('by-hand')
    expect(confidence).toBe(0.95)
    expect(scenes).toMatchObject({ true: 4, matched: 4, missing: { count: 0, first: [] } })
    const [ice, radius] = quantities
    // Errors 1 0 2 -1.
    expect(ice).toMatchObject({ quantity: 'ice_ug_per_m2', threshold: 3 })
    expect(ice.overall.bias.value).toBe(0.5)
    expect(ice.overall.medianAbsoluteError.value).toBe(1)
    expect(ice.overall.coverage.value).toBeCloseTo(2 / 3, 12)
    expect(ice.overall.hitRate.value).toBe(1)
    expect(ice.overall.falseAlarmRate.value).toBe(0)
    expect(ice.bins).toMatchObject([
      { from: null, to: 3, estimates: 2, bias: { value: 0.5 } },
      { from: 3, to: null, estimates: 2, bias: { value: 0.5 } },
    ])
    // One radius is not true of anything, another was not estimated.
    expect(radius.overall).toMatchObject({ scenes: 3, estimates: 2, uncertainties: 0 })
    expect(radius.overall).toMatchObject({ coverage: null, hitRate: null, rmse: { value: 0 } })
  })

  it('writes a residual per quantity and scene, in the order of the truth', async () => {
    await score('mine.csv', { out: 'residuals' })
    const { columns, rows } = await readTable(join(place, 'residuals', 'residuals.arrow'))
    expect(rows).toBe(8)
    expect(columns.scene_id).toEqual(['a', 'b', 'c', 'd', 'a', 'b', 'c', 'd'])
    expect(columns.quantity.slice(3, 5)).toEqual(['ice_ug_per_m2', 'radius_nm'])
    expect([...columns.residual]).toEqual([1, 0, 2, -1, 0, Number.NaN, Number.NaN, 0])
    expect([...columns.uncertainty.slice(0, 4)]).toEqual([1, 0.5, 1, Number.NaN])
    expect([...columns.within.slice(0, 4)]).toEqual([1, 1, 0, Number.NaN])
  })

  it('writes equal bytes for equal tables and seeds, and other intervals for another seed', async () => {
    for (const [out, seed] of [
      ['first', '3'],
      ['second', '3'],
      ['other', '4'],
    ])
      await score('mine.csv', { out, seed })
    const bytes = (directory: string, name: string) =>
      readFileSync(join(place, directory, name)).toString('hex')
    for (const name of ['scores.json', 'residuals.arrow'])
      expect(bytes('second', name)).toBe(bytes('first', name))
    expect(bytes('other', 'residuals.arrow')).toBe(bytes('first', 'residuals.arrow'))
    expect(scoresIn('other').quantities).not.toEqual(scoresIn('first').quantities)
  })

  it('finds the coverage of correctly stated Gaussian uncertainties, from Arrow against Arrow', async () => {
    const COUNT = 4000
    const { uniform, normal } = randomStream(11)
    const truth = Array.from({ length: COUNT }, () => 100 * uniform())
    const ids = truth.map((_, i) => `scene-${i}`)
    const id = { ...variable('scene_id', 'scene', ''), type: 'text' as const }
    const write = (name: string, columns: Record<string, number[]>) => {
      const fields = [id, ...Object.keys(columns).map((key) => variable(key, key, ''))]
      const table = new TableWriter(join(place, name), {
        fields: scalarFields(fields),
        metadata: [],
        rowsPerBatch: 1000,
      })
      table.append({ scene_id: ids, ...columns }, COUNT)
      table.close()
    }
    write('truth.arrow', { ice_ug_per_m2: truth })
    write('gauss.arrow', {
      ice_ug_per_m2: truth.map((value) => value + 5 * normal()),
      ice_ug_per_m2_uncertainty: truth.map(() => 5),
    })
    await score('gauss.arrow', { truth: 'truth.arrow', out: 'gauss' })
    const [{ overall, bins }] = scoresIn('gauss').quantities
    // erf(1/sqrt 2) = 0.6827, from memory; four standard errors of the share, 4 sqrt(0.217/n).
    expect(Math.abs(overall.coverage.value - 0.6827)).toBeLessThan(4 * Math.sqrt(0.217 / COUNT))
    expect(bins).toHaveLength(4)
    for (const bin of bins) {
      expect(bin.estimates).toBe(COUNT / 4)
      expect(Math.abs(bin.coverage.value - 0.6827)).toBeLessThan(4 * Math.sqrt(0.868 / COUNT))
    }
  })

  it('counts and names unknown, missing and repeated scenes, and columns that are not scored', async () => {
    file('odd.csv', 'scene_id,radius_nm,ice_ug_per_m', 'a,31,1', 'x,1,1', 'a,99,1', 'b,41,1')
    const { code, stdout, stderr } = await score('odd.csv', { out: 'odd', json: true })
    expect(code).toBe(0)
    const found = JSON.parse(stdout)
    expect(found).toMatchObject({
      status: 'finished',
      estimates: 'odd.csv',
      scenes: {
        matched: 2,
        unknown: { count: 1, first: ['x'] },
        missing: { count: 2, first: ['c', 'd'] },
        duplicate: { count: 1, first: ['a'] },
      },
      unscored: ['ice_ug_per_m'],
    })
    expect(found.quantities[0].overall.bias.value).toBe(1)
    expect(stderr).toContain('1 scene estimated but not among the truth: x\n')
    expect(stderr).toContain('2 scenes of the truth without a row of estimates: c, d\n')
    expect(stderr).toContain('1 scene estimated more than once, of which the first row counts: a\n')
    expect(stderr).toContain('no such quantity: ice_ug_per_m (did you mean ice_ug_per_m2?)\n')
  })

  it('takes several draws of a scene for what they are', async () => {
    file('draws.csv', 'scene_id,draw,radius_nm', 'a,0,31', 'a,1,29', 'b,0,40')
    await score('draws.csv', { out: 'draws', quiet: true })
    const { scenes, quantities } = scoresIn('draws')
    expect(scenes.duplicate.count).toBe(0)
    expect(quantities[0].overall).toMatchObject({ scenes: 2, estimates: 3, bias: { value: 0 } })
    const { columns } = await readTable(join(place, 'draws', 'residuals.arrow'))
    expect(columns.draw).toEqual(['0', '1', '0'])
  })

  it('says where the output is and nothing else with --quiet', async () => {
    const { stdout, stderr } = await score('mine.csv', { out: 'quiet', quiet: true })
    expect([stdout, stderr]).toEqual(['quiet\n', ''])
  })

  it('replaces its own output with --force alone, and nothing else', async () => {
    await score('mine.csv', { out: 'again' })
    await expect(score('mine.csv', { out: 'again' })).rejects.toThrow('again exists already')
    expect((await score('mine.csv', { out: 'again', force: true })).code).toBe(0)
    mkdirSync(join(place, 'thesis'))
    file('thesis/thesis.tex', 'years of work')
    await expect(score('mine.csv', { out: 'thesis', force: true })).rejects.toThrow(
      'is not the output of a mesofrost run',
    )
  })

  it.each([
    ['radius', { threshold: ['radius=3'] }, '; did you mean radius_nm?'],
    ['flag', { bins: ['flag=3'] }, '--bins flag: no such quantity is scored; scored: '],
    ['no count', { resamples: '0' }, '--resamples 0: expected a whole number from 1 on'],
  ])('refuses options that fit nothing: %s', async (_what, options, message) => {
    await expect(score('mine.csv', options)).rejects.toThrow(message)
  })

  it.each([
    ['twice.csv', ['scene_id,radius_nm', 'a,1', 'a,2'], 'names a scene more than once: a'],
    ['elsewhere.csv', ['scene_id,radius_nm', 'z,1'], 'have no scene in common'],
    ['nameless.csv', ['radius_nm', '1'], 'nameless.csv:1: no column scene_id'],
    ['ragged.csv', ['scene_id,radius_nm', 'a'], 'ragged.csv:2: 1 fields; allowed: 2'],
    ['other.csv', ['scene_id,albedo', 'a,1'], 'have no quantity in common'],
  ])('refuses the truth %s and writes nothing', async (name, lines, message) => {
    file(name, ...lines)
    const before = readdirSync(place)
    await expect(score('mine.csv', { truth: name })).rejects.toMatchObject({
      exitCode: 2,
      message: expect.stringContaining(message),
    })
    expect(readdirSync(place)).toEqual(before)
  })
})
