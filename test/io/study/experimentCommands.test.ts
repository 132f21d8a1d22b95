import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { runScenario } from '../../../src/io/runScenario.ts'
import { type Captured, captured } from '../capturedTerminal.ts'
import { standInRequest } from '../standInModel.ts'

/** Small and quick; invented. */
const SMALL = 'title: small\nduration_h: 1\ngrid: { levels: 20 }\nsizes: { classes: 12 }\n'

let place: string
beforeAll(async () => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost experiments-'))
  writeFileSync(join(place, 'small.yaml'), SMALL)
  study('study', { axes: '[{ key: water.factor, list: [1, 2] }]' })
  study('unknown-key', { axes: '[{ key: water.facto, list: [1, 2] }]' })
  study('out-of-range', { axes: '[{ key: water.factor, list: [1, 2000] }]' })
  study('empty', { axes: '[]' })
  study('empty-list', { axes: '[{ key: water.factor, list: [] }]' })
  study('no-samples', {
    axes: '[{ key: water.factor, uniform: { from: 1, to: 2 } }]',
    design: 'sobol',
  })
  study('large', { axes: '[{ key: water.factor, linear: { from: 1, to: 2, count: 1001 } }]' })
  study('slip', { axis: '[]' })
  study('classes', {
    axes: '[{ key: sizes.classes, list: [12, 24] }]',
    keep: '{ scene_times_h: [1] }',
  })
  writeFileSync(join(place, 'pulse.yaml'), 'perturbations: none\n')
  mkdirSync(join(place, 'thesis'))
  writeFileSync(join(place, 'thesis', 'thesis.tex'), 'years of work')
  await runScenario(standInRequest(place))
})
afterAll(() => rmSync(place, { recursive: true }))

function study(name: string, keys: Record<string, string>): void {
  const lines = Object.entries({ base: 'small.yaml', ...keys }).map(
    ([key, text]) => `${key}: ${text}\n`,
  )
  writeFileSync(join(place, `${name}.yaml`), lines.join(''))
}

function say(...words: string[]): Promise<Captured> {
  return captured(words, { workingDirectory: place, scenarioDirectory: join(place, 'none') })
}

const COMMANDS = ['perturb', 'compare', 'response-map', 'sweep', 'sweep-gather', 'converge']

describe('the experiments on the command line', () => {
  it.each(COMMANDS)('help with %s, by examples', async (command) => {
    const { code, stdout } = await say(command, '--help')
    expect(code).toBe(0)
    expect(stdout).toMatch(/Examples:\n {2}mesofrost/)
    expect(stdout).toContain('Exit codes')
  })

  it('are all named in the general help', async () => {
    const { stdout } = await say('--help')
    for (const command of COMMANDS) expect(stdout).toContain(`mesofrost ${command}`)
  })

  it.each([
    [['perturb', 'small.yaml'], 'give at least one --change'],
    [['perturb', 'small.yaml', '--change', 'temprature:+1K'], 'did you mean temperature?'],
    [['perturb', 'small.yaml', '--change', 'temperature:1'], "read '1' as the amount; expected"],
    [
      ['perturb', 'small.yaml', '--change', 'temperature:+1K@60..84km'],
      'reaches out of the column',
    ],
    [['perturb', 'small.yaml', '--change', 'pulse.yaml'], 'expected a list of perturbations'],
    [['perturb', 'small.yaml', '--change', 'none.yaml'], 'change none.yaml does not exist'],
    [['perturb', 'small.yaml', '--change', 'water:+1%', '-o', 'thesis'], 'thesis exists already'],
    [
      ['perturb', 'small.yaml', '--change', 'water:+1%', '-o', 'thesis', '--force'],
      'is not the output of a mesofrost run',
    ],
    [
      ['perturb', 'small.yaml', '--change', 'water:+1%', '--jobs', '0'],
      '--jobs 0: expected a whole',
    ],
    [['compare', 'run', 'nowhere'], 'nowhere is not a run directory'],
    [['compare', 'run'], 'mesofrost compare needs <control> <changed>'],
    [['compare', 'run', 'run'], 'written by another version'],
    [
      ['response-map', 'small.yaml', '--bands', '80-90km'],
      '--bands 80-90km: expected FROM..TO/STEP',
    ],
    [['response-map', 'small.yaml', '--bands', '70..90/2km'], 'reaches out of the column'],
    [['response-map', 'small.yaml', '--amount', 'much'], "amount 'much': expected"],
    [['response-map', 'small.yaml', '--at', '1h', '--mean', '0..1h'], 'mutually exclusive'],
    [['response-map', 'small.yaml', '--quantity', 'ice'], 'invalid values'],
    [['sweep', 'nothing'], 'no file and no shipped study is called nothing'],
    [['sweep', 'nothing.yaml'], 'study nothing.yaml does not exist'],
    [['sweep', 'study.yaml', '--part', '5/4', '-o', 'x'], '--part 5/4: expected i/n'],
    [['sweep', 'study.yaml', '--part', '1/4'], '--part needs --out'],
    [['sweep', 'study.yaml', '--part', '1/4', '-o', 'x', '--force'], 'leave it out'],
    [['sweep', 'study.yaml', '-o', 'thesis'], 'holds something else than a study'],
    [['sweep', 'study.yaml', '-o', 'thesis', '--force'], 'holds something else than a study'],
    [['sweep', 'unknown-key.yaml'], 'did you mean water.factor?'],
    [['sweep', 'out-of-range.yaml'], 'member 1 (water.factor = 2000)'],
    [['sweep', 'empty.yaml'], 'the design is empty'],
    [['sweep', 'empty-list.yaml'], 'water.factor: its list is empty'],
    [['sweep', 'no-samples.yaml'], 'the design is empty: samples is missing'],
    [['sweep', 'large.yaml', '--max-members', '1000'], '1001 members (1001); allowed: up to 1000'],
    [['sweep', 'slip.yaml'], 'slip.yaml:2:1: axis: unknown key'],
    [['sweep', 'classes.yaml'], 'sizes.classes is an axis'],
    [['sweep-gather', 'thesis'], 'thesis is not a study directory'],
    [['sweep-gather', 'nowhere'], 'nowhere is not a study directory'],
  ])('refuse %j in one line, with exit code 2 and nothing on stdout', async (words, message) => {
    const before = readdirSync(place).sort()
    const { code, stdout, stderr } = await say(...words)
    expect(stderr).toContain(message)
    expect([code, stdout]).toEqual([2, ''])
    expect(readdirSync(place).sort()).toEqual(before)
  })
})
