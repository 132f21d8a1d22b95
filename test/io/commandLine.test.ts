import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { runScenario } from '../../src/io/runScenario.ts'
import { type Captured, captured } from './capturedTerminal.ts'
import { standInRequest } from './standInModel.ts'

let place: string
let scenarioDirectory: string
beforeAll(async () => {
  place = mkdtempSync(join(tmpdir(), 'mesofrost command-'))
  scenarioDirectory = join(place, 'shipped')
  mkdirSync(scenarioDirectory)
  const quiet = '# invented\ntitle: A quiet night\nquestion: >\n  What grows\n  by itself?\n'
  writeFileSync(join(scenarioDirectory, 'quiet-night.yaml'), quiet)
  writeFileSync(join(scenarioDirectory, 'windy.yaml'), 'title: A windy night\n')
  await runScenario(standInRequest(place))
})
afterAll(() => rmSync(place, { recursive: true }))

function say(...words: string[]): Promise<Captured> {
  return captured(words, { workingDirectory: place, scenarioDirectory })
}

describe('the command line', () => {
  it('helps on stdout, with commands and exit codes', async () => {
    const { code, stdout, stderr } = await say('--help')
    expect(code).toBe(0)
    expect(stderr).toBe('')
    for (const command of ['run', 'check', 'scenarios', 'show', 'variables', 'schema'])
      expect(stdout).toContain(`mesofrost ${command}`)
    expect(stdout).toContain('Exit codes: 0 done, 1 the run failed, 2 bad input')
    expect(stdout).toContain('130 interrupted by Ctrl-C, 143 terminated')
  })

  it.each(['run', 'check', 'scenarios', 'show', 'variables', 'schema'])(
    'helps with %s, by examples',
    async (command) => {
      const { code, stdout } = await say(command, '--help')
      expect(code).toBe(0)
      expect(stdout).toMatch(/Examples:\n {2}mesofrost/)
      expect(stdout).toContain('Exit codes')
    },
  )

  it('tells its version', async () => {
    expect(await say('--version')).toEqual({ code: 0, stdout: '1.2.3\n', stderr: '' })
  })

  it('shows the help as an error when it is given nothing to do', async () => {
    const { code, stdout, stderr } = await say()
    expect([code, stdout]).toEqual([2, ''])
    expect(stderr).toContain('mesofrost run')
  })

  it.each([
    [['rnu', 'quiet-night'], "unknown command 'rnu'; did you mean run?"],
    [['zzz'], "unknown command 'zzz'"],
    [['run', 'quiet-night', '--quite'], 'unknown option --quite; did you mean --quiet?'],
    [['run', 'quiet-night', '--set.x', '1'], 'unknown option --set.x; did you mean --set?'],
    [['run', 'quiet-night', '-z'], 'unknown option -z'],
    [['run', 'quiet-night', 'windy'], "'windy' is one word too many for mesofrost run"],
    [['run', 'a', '--out', 'x', '--out', 'y'], '--out was given more than once'],
    [['run', 'a', '--out'], '--out needs a value'],
    [['run'], 'give a scenario, or --from RUN_DIR; mesofrost scenarios lists shipped ones'],
    [['check'], 'mesofrost check needs <scenario>; mesofrost check --help tells more'],
    [['show', 'run', '--csv', '--json'], 'arguments csv and json are mutually exclusive'],
    [['show', 'nothing'], 'there is no nothing'],
    [['show', 'shipped'], 'holds no run.json of mesofrost'],
    [['show', 'run', '--at', 'noon'], "'noon' is not a time; write 12h, 90min, 3600s or 2d"],
    [['show', 'run', '--at', '9h'], '9 h is outside the table, which runs from 0 h to 6 h'],
    [
      ['show', 'run', '--variables', 'second'],
      "no variable 'second' in this file; did you mean seconds?",
    ],
    [
      ['scenarios', 'quite-night'],
      "no scenario 'quite-night' is shipped; did you mean quiet-night?",
    ],
    [['scenarios', 'xyz'], 'there are quiet-night, windy'],
  ])('refuses %j in one line, with exit code 2 and nothing on stdout', async (words, message) => {
    const { code, stdout, stderr } = await say(...words)
    expect(stderr).toContain(message)
    expect(stderr).toMatch(/^mesofrost: .*\n$/)
    expect([code, stdout]).toEqual([2, ''])
  })

  it('writes nothing for bad input', async () => {
    await say('run', 'nowhere.yaml', '--out', 'unwritten')
    expect(readdirSync(place).sort()).toEqual(['run', 'shipped'])
  })
})

describe('scenarios', () => {
  it('lists the shipped scenarios with their questions', async () => {
    const { stdout } = await say('scenarios')
    expect(stdout).toBe('  quiet-night  What grows by itself?\n  windy        A windy night\n')
  })

  it('prints one as it is, to start from', async () => {
    const { stdout } = await say('scenarios', 'windy')
    expect(stdout).toBe('title: A windy night\n')
  })
})

describe('show', () => {
  it('tells of a run directory how it went, and its brightness', async () => {
    const { code, stdout } = await say('show', 'run')
    expect(code).toBe(0)
    expect(stdout).toMatch(/^a stand-in \(finished\)\n {2}outputs {2}37\n {2}nothing {2}-\n/)
    expect(stdout).toContain('warning: a warning')
    expect(stdout).toMatch(/\n\s+6 {2}lidar {4}21600\n$/)
  })

  it('shows the profile at the nearest output time', async () => {
    const { stdout } = await say('show', 'run', '--at', '121min')
    expect(stdout).toBe(
      'time_h  altitude_km  seconds\n     2           80     7200\n     2           81     7200\n',
    )
  })

  it('finds the table that has the variables', async () => {
    const { stdout } = await say('show', 'run', '--variables', 'residual', '--csv')
    expect(stdout.split('\n').slice(0, 3)).toEqual(['time_h,residual', '0,0', `${1 / 6},0`])
  })

  it('shows the last time of a profile on the screen and says so', async () => {
    const { stdout, stderr } = await say('show', 'run/profiles.arrow')
    expect(stdout.split('\n')).toHaveLength(4)
    expect(stderr).toBe('mesofrost: the last of 37 times, 6 h; --at 12h shows another, --csv all\n')
  })

  it('spreads the size classes over columns', async () => {
    const { stdout } = await say('show', 'run/size-distribution.arrow', '--at', '0h', '--csv')
    expect(stdout.split('\n')[0]).toBe(
      'time_h,altitude_km,number_per_class_per_m3_1,number_per_class_per_m3_2',
    )
  })

  it('gives one JSON object with null where there is no value', async () => {
    const { stdout } = await say('show', 'run/brightness.arrow', '--at', '1h', '--json')
    const { variables, columns } = JSON.parse(stdout)
    expect(columns).toEqual({ time_h: [1, 1], channel: ['uv', 'lidar'], peak: [null, 3600] })
    expect(variables[1]).toEqual({ name: 'channel', unit: '1', long_name: 'channel' })
  })
})
