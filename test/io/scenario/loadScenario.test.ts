import { mkdirSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { resolve } from '../../../src/model/scenario/resolve.ts'
import { scenarioFiles } from './scenarioFiles.ts'

const files = scenarioFiles()

describe('a scenario file', () => {
  it('is read from YAML', () => {
    files.write(
      'night.yaml',
      'title: A night\nduration_h: 6\nwaves:\n  - {amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10}\n',
    )
    const { title, document, scenario, warnings, sourcePath } = files.load('night.yaml')
    expect(title).toBe('A night')
    expect(document.duration_h).toBe(6)
    expect(scenario.duration_s).toBe(21600)
    expect(scenario.waves).toHaveLength(1)
    expect(warnings).toEqual([])
    expect(sourcePath).toBe(files.path('night.yaml'))
  })

  it('is read from JSON, also with tabs and a byte order mark', () => {
    files.write(
      'night.json',
      '\uFEFF{\n\t"duration_h": 6,\n\t"grid": {\n\t\t"levels": 20\n\t}\n}\n',
    )
    expect(files.load('night.json').scenario.grid.levels).toBe(20)
  })

  it('may use anchors', () => {
    files.write(
      'a.yaml',
      'waves:\n  - &w {amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10}\n  - *w\n',
    )
    expect(files.load('a.yaml').scenario.waves).toHaveLength(2)
  })

  it('is read again from the run that it made', () => {
    files.write('night.yaml', 'water: {at_83km_ppmv: 3}\nduration_h: 6\n')
    const first = files.load('night.yaml')
    files.write(
      'run.json',
      JSON.stringify({ format: 'mesofrost-run', scenario: first.document }, null, 2),
    )
    const again = files.load('run.json')
    expect(again.scenario).toEqual(first.scenario)
    expect(JSON.stringify(again.document)).toBe(JSON.stringify(first.document))
    expect(resolve(first.document).scenario).toEqual(first.scenario)
  })

  it('is found by name among the shipped ones, but a path is a path', () => {
    mkdirSync(files.path('shipped'))
    files.write('shipped/quiet-night.yaml', 'title: shipped\n')
    files.write('quiet-night', 'title: own\n')
    expect(files.load('quiet-night').title).toBe('shipped')
    expect(files.load('./quiet-night').title).toBe('own')
    expect(files.refusal('quite-night')).toBe(
      'no file and no shipped scenario is called quite-night; shipped: quiet-night; did you mean quiet-night?',
    )
  })
})

describe('a file that is no scenario', () => {
  it.each<[string, string | Uint8Array, string]>([
    ['empty', '', 'scenario bad.yaml is empty'],
    ['only comments', '# nothing\n', 'scenario bad.yaml is empty'],
    [
      'binary',
      new Uint8Array([0x89, 0x50, 0, 1]),
      'scenario bad.yaml is binary; allowed: UTF-8 text',
    ],
    ['another encoding', new Uint8Array([0x61, 0xe9, 0x62]), 'scenario bad.yaml is not UTF-8 text'],
    [
      'a list',
      '- 1\n',
      'scenario bad.yaml is not a mapping; allowed: lines of the form key: value',
    ],
    ['bare text', 'hello\n', 'scenario bad.yaml is not a mapping'],
    [
      'too large',
      '#'.repeat(10 * 1024 * 1024 + 1),
      'scenario bad.yaml has 10.0 MB; allowed: up to 10 MB',
    ],
    [
      'a repeated key',
      'duration_h: 1\nduration_h: 2\n',
      'bad.yaml:2:1: not valid YAML: Map keys must be unique',
    ],
    [
      'indented by tabs',
      'grid:\n\tlevels: 20\n',
      'bad.yaml:2:1: not valid YAML: Tabs are not allowed as indentation',
    ],
    ['an open bracket', 'grid: {levels: 20\n', 'bad.yaml:2:1: not valid YAML: '],
    [
      'two documents',
      'duration_h: 1\n---\nduration_h: 2\n',
      'not valid YAML: Source contains multiple documents',
    ],
    ['an unknown tag', 'title: !x y\n', 'bad.yaml:1:8: not valid YAML: Unresolved tag: !x'],
    [
      'a run record without scenario',
      '{"format": "mesofrost-run"}',
      'run record bad.yaml holds no scenario',
    ],
    ['nested without end', '['.repeat(20_000), 'bad.yaml is nested too deeply'],
    ['an alias of nothing', 'waves: *w\n', 'bad.yaml:1:8: not valid YAML: no anchor &w above'],
    ['a list in itself', 'waves: &a [*a]\n', 'bad.yaml is nested too deeply'],
  ])('%s: one clear error', (_, content, message) => {
    files.write('bad.yaml', content)
    expect(files.refusal('bad.yaml')).toContain(message)
  })

  it('aliases that multiply are stopped', () => {
    const levels = Array.from(
      { length: 9 },
      (_, i) => `a${i + 1}: &a${i + 1} [${Array(10).fill(`*a${i}`)}]`,
    )
    files.write('bad.yaml', `a0: &a0 [1]\n${levels.join('\n')}\n`)
    expect(files.refusal('bad.yaml')).toBe('bad.yaml has too many aliases')
  })

  it('missing or a directory: one clear error', () => {
    expect(files.refusal('none.yaml')).toBe('scenario none.yaml does not exist')
    mkdirSync(files.path('folder.yaml'))
    expect(files.refusal('folder.yaml')).toBe(
      'scenario folder.yaml is a directory; allowed: a file',
    )
  })
})

describe('an error names file, line and column', () => {
  it.each([
    [
      'duration_h: -5\n',
      'bad.yaml:1:13: duration_h: -5 is not allowed; allowed: a number above 0, up to 10000',
    ],
    ['title: x\nduraton_h: 5\n', 'bad.yaml:2:1: duraton_h: unknown key;'],
    [
      'grid:\n  bottom_km: 80\n  levels: 1e7\n',
      'bad.yaml:3:11: grid.levels: 10000000 is not allowed',
    ],
    ['duration_h: .nan\n', 'bad.yaml:1:13: duration_h: NaN is not allowed'],
    ['duration_h:\n', 'bad.yaml:1:12: duration_h: null is not allowed'],
    [
      'waves:\n  - amplitude_K: 5\n    period_h: 1\n',
      'bad.yaml:2:5: waves.0.vertical_wavelength_km: is missing',
    ],
    [
      'duration_h: 1\noutput_every_min: 90\n',
      'bad.yaml:2:19: output_every_min: 90 is not allowed; allowed: at most the length of the run, 60 min',
    ],
    [
      'grid: {bottom_km: 90, top_km: 80}\n',
      'bad.yaml:1:31: grid.top_km: 80 is not allowed; allowed: above bottom_km 90',
    ],
    [
      'water:\n  knots:\n    - {altitude_km: 90, water_ppmv: 3}\n    - {altitude_km: 80, water_ppmv: 3}\n',
      'bad.yaml:4:21: water.knots.1.altitude_km: 80 after 90 is not allowed',
    ],
    [
      'channels:\n  - {name: a, wavelength_nm: 50, geometry: backscatter}\n',
      'bad.yaml:2:30: channels.0.wavelength_nm: 50 is not allowed without a refractive_index',
    ],
    ['__proto__: {duration_h: 1}\n', 'bad.yaml:1:1: __proto__: unknown key'],
  ])('%j', (content, message) => {
    files.write('bad.yaml', content)
    expect(files.refusal('bad.yaml')).toContain(message)
  })

  it('and further errors stand on lines of their own', () => {
    files.write('bad.yaml', 'duration_h: -1\noutput_every_min: 0\n')
    expect(
      files
        .refusal('bad.yaml')
        .split('\n')
        .map((line) => line.slice(0, 13)),
    ).toEqual(['bad.yaml:1:13', 'bad.yaml:2:19'])
  })
})
