import { mkdirSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { scenarioFiles } from './scenarioFiles.ts'

const files = scenarioFiles()

describe('extends', () => {
  it('merges mappings, replaces lists, and keeps what the child does not say', () => {
    files.write(
      'base.yaml',
      'title: base\ngrid: {bottom_km: 78, levels: 30}\nwaves: [{amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10}]\n',
    )
    files.write('child.yaml', 'extends: base.yaml\ntitle: child\ngrid: {levels: 40}\nwaves: []\n')
    const { title, document } = files.load('child.yaml')
    expect(title).toBe('child')
    expect(document.grid).toEqual({ bottom_km: 78, top_km: 96, levels: 40 })
    expect(document.waves).toEqual([])
    expect(document.extends).toBeUndefined()
  })

  it('finds a shipped scenario by its name and a file beside its own', () => {
    for (const directory of ['shipped', 'inner']) mkdirSync(files.path(directory))
    files.write('shipped/quiet-night.yaml', 'duration_h: 7\n')
    files.write('inner/base.yaml', 'extends: quiet-night\ntitle: inner\n')
    files.write('child.yaml', 'extends: inner/base.yaml\n')
    const { title, document } = files.load('child.yaml')
    expect([title, document.duration_h]).toEqual(['inner', 7])
  })

  it('drops the form of a profile that the child replaces by another', () => {
    files.write(
      'base.yaml',
      'wind:\n  knots: [{altitude_km: 70, wind_cm_per_s: 1}, {altitude_km: 100, wind_cm_per_s: 1}]\n  factor: 2\n',
    )
    files.write(
      'child.yaml',
      'extends: base.yaml\nwind: {table: {altitude_km: [70, 100], wind_cm_per_s: [3, 4]}}\n',
    )
    const { wind } = files.load('child.yaml').document
    expect(wind).toEqual({ table: { altitude_km: [70, 100], wind_cm_per_s: [3, 4] }, factor: 2 })
  })

  it('drops a water factor that the child replaces by a value at 83 km', () => {
    files.write('base.yaml', 'water: {factor: 2}\n')
    files.write('child.yaml', 'extends: base.yaml\nwater: {at_83km_ppmv: 3}\n')
    expect(files.load('child.yaml').document.water).toMatchObject({ factor: 1, at_83km_ppmv: 3 })
  })

  it('takes a value of the parent away where the child says null', () => {
    files.write('base.yaml', 'duration_h: 6\nrandom_waves: {seed: 2}\n')
    files.write('child.yaml', 'extends: base.yaml\nduration_h: null\nrandom_waves: null\n')
    const { document } = files.load('child.yaml')
    expect(document.duration_h).toBe(24)
    expect(document.random_waves).toBeUndefined()
  })

  it('places an error in the file that holds the value', () => {
    files.write('base.yaml', '\n\nduration_h: -1\n')
    files.write('child.yaml', 'extends: base.yaml\ngrid: {levels: 1}\n')
    expect(files.refusal('child.yaml').split('\n')).toEqual([
      'base.yaml:3:13: duration_h: -1 is not allowed; allowed: a number above 0, up to 10000',
      'child.yaml:2:16: grid.levels: 1 is not allowed; allowed: a whole number from 4 to 2000',
    ])
  })

  it('names the chain of a circle', () => {
    files.write('a.yaml', 'extends: b.yaml\n')
    files.write('b.yaml', 'extends: a.yaml\n')
    expect(files.refusal('a.yaml')).toBe('a.yaml extends itself: a.yaml -> b.yaml -> a.yaml')
    files.write('c.yaml', 'extends: c.yaml\n')
    expect(files.refusal('c.yaml')).toBe('c.yaml extends itself: c.yaml -> c.yaml')
  })

  it('says where a missing parent is asked for, and refuses what is no name', () => {
    files.write('a.yaml', 'title: x\nextends: none.yaml\n')
    expect(files.refusal('a.yaml')).toBe('a.yaml:2:10: extends: scenario none.yaml does not exist')
    files.write('a.yaml', 'extends: nothing\n')
    expect(files.refusal('a.yaml')).toContain(
      'a.yaml:1:10: extends: no file and no shipped scenario is called nothing',
    )
    files.write('a.yaml', 'extends: [b]\n')
    expect(files.refusal('a.yaml')).toBe(
      'a.yaml:1:10: extends: ["b"] is not allowed; allowed: text of up to 10000 letters',
    )
  })
})

describe('--set', () => {
  it('overrides keys, makes sections and reads values as YAML', () => {
    files.write('a.yaml', 'duration_h: 6\n')
    const { document } = files.load(
      'a.yaml',
      'duration_h=3',
      'water.at_83km_ppmv=2.5',
      'processes.closed=true',
      'title=a=b',
      'waves=[{amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10}]',
      'waves.0.amplitude_K=7',
    )
    expect(document.duration_h).toBe(3)
    expect(document.water.at_83km_ppmv).toBe(2.5)
    expect(document.processes.closed).toBe(true)
    expect(document.title).toBe('a=b')
    expect(document.waves[0]).toMatchObject({ amplitude_K: 7, period_h: 1 })
  })

  it('reaches into a list that stands at its default', () => {
    files.write('a.yaml', 'title: a\n')
    const { document } = files.load(
      'a.yaml',
      'channels.0.wavelength_nm=265',
      'temperature.knots.6.temperature_K=131',
    )
    expect(document.channels.map(({ wavelength_nm }) => wavelength_nm)).toEqual([265, 532, 355])
    expect(document.temperature.knots?.[6]).toEqual({ altitude_km: 88, temperature_K: 131 })
  })

  it('brings a default back with null', () => {
    files.write('a.yaml', 'duration_h: 6\n')
    expect(files.load('a.yaml', 'duration_h=null').document.duration_h).toBe(24)
  })

  it('drops the other form of a profile', () => {
    files.write('a.yaml', 'wind: {table: {altitude_km: [70, 100], wind_cm_per_s: [3, 4]}}\n')
    const knots = '[{altitude_km: 70, wind_cm_per_s: 1}, {altitude_km: 100, wind_cm_per_s: 1}]'
    expect(files.load('a.yaml', `wind.knots=${knots}`).document.wind).not.toHaveProperty('table')
    expect(files.refusal('a.yaml', 'wind.knots.0.wind_cm_per_s=1')).toBe(
      '--set wind.knots.0.wind_cm_per_s=1: wind uses table, not knots',
    )
  })

  it.each([
    ['duration_h', '--set duration_h: expected path=value, such as --set duration_h=6'],
    ['=3', '--set =3: expected path=value'],
    ['a..b=3', '--set a..b=3: expected path=value'],
    ['duration_h=', '--set duration_h=: no value; expected path=value'],
    ['duration_h=[1', '--set duration_h=[1: not valid YAML: '],
    [
      'duration_h=-5',
      '--set duration_h=-5: duration_h: -5 is not allowed; allowed: a number above 0',
    ],
    ['duraton_h=5', 'did you mean duration_h?'],
    ['chanels.0.wavelength_nm=5', '--set chanels.0.wavelength_nm=5: chanels: unknown key'],
    [
      'grid.level=5',
      '--set grid.level=5: grid.level: unknown key; allowed here: bottom_km, top_km, levels; did you mean levels?',
    ],
    ['duration_h.x=5', '--set duration_h.x=5: duration_h is 6, which has no keys'],
    [
      'channels.3.name=x',
      '--set channels.3.name=x: channels has no item 3; allowed: 0 to 2 (a list can be set as a whole)',
    ],
    ['waves.0.period_h=1', '--set waves.0.period_h=1: waves has no item 0; allowed: none'],
    ['channels.x=1', '--set channels.x=1: channels: {"x":1} is not allowed; allowed: a list of'],
    ['__proto__.x=1', '--set __proto__.x=1: __proto__: unknown key'],
    ['water.factor=.inf', '--set water.factor=.inf: water.factor: Infinity is not allowed'],
  ])('%s is refused', (setting, message) => {
    files.write('a.yaml', 'duration_h: 6\n')
    expect(files.refusal('a.yaml', setting)).toContain(message)
  })
})
