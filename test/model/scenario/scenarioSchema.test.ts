import { describe, expect, it } from 'vitest'
import { complete } from '../../../src/model/scenario/complete.ts'
import { ScenarioError } from '../../../src/model/scenario/problems.ts'
import { scenarioJsonSchema } from '../../../src/model/scenario/schema.ts'

interface Node {
  description?: string
  default?: unknown
  type?: string
  properties?: Record<string, Node>
  items?: Node
}

function eachKey(node: Node, path: string, visit: (path: string, key: Node) => void): void {
  for (const [name, key] of Object.entries(node.properties ?? {})) {
    visit(`${path}${name}`, key)
    eachKey(key, `${path}${name}.`, visit)
    if (key.items !== undefined) eachKey(key.items, `${path}${name}.`, visit)
  }
}

function messageOf(document: unknown): string {
  try {
    complete(document)
  } catch (error) {
    expect(error).toBeInstanceOf(ScenarioError)
    return (error as Error).message
  }
  throw new Error('nothing was refused')
}

describe('the scenario schema', () => {
  it('documents every key', () => {
    const bare: string[] = []
    eachKey(scenarioJsonSchema() as Node, '', (path, { description }) => {
      if (description === undefined) bare.push(path)
    })
    expect(bare).toEqual([])
  })

  it('gives the reason of every single default', () => {
    const bare: string[] = []
    eachKey(scenarioJsonSchema() as Node, '', (path, key) => {
      if (key.default === undefined || key.type === 'object') return
      if (!/Default .+: .+\.$/.test(key.description ?? '')) {
        // A list that is empty by default says why in words.
        if (!/Default none: .+\.$/.test(key.description ?? '')) bare.push(path)
      }
    })
    expect(bare).toEqual([])
  })

  it('needs no key at all', () => {
    expect(scenarioJsonSchema()).not.toHaveProperty('required')
    expect(complete({}).temperature.knots).toContainEqual({ altitude_km: 88, temperature_K: 129 })
  })

  it('is the JSON Schema of what is accepted: its own defaults are allowed', () => {
    const defaults: Record<string, unknown> = {}
    for (const [key, node] of Object.entries((scenarioJsonSchema() as Node).properties ?? {})) {
      if (node.default !== undefined) defaults[key] = node.default
    }
    expect(Object.keys(defaults).length).toBeGreaterThan(15)
    expect(complete(defaults)).toEqual(complete({}))
  })

  it('completes to the same document when completed again', () => {
    const document = complete({
      waves: [{ amplitude_K: 5, period_h: 1, vertical_wavelength_km: 10 }],
      random_waves: {},
      perturbations: [{ quantity: 'wind', add_cm_per_s: 1 }],
    })
    expect(complete(document)).toEqual(document)
    const text = JSON.stringify(document)
    expect(JSON.stringify(complete(JSON.parse(text)))).toBe(text)
  })

  it('does not let one document change the defaults of the next', () => {
    const first = complete({})
    first.temperature.knots?.splice(0)
    first.channels.splice(0)
    first.nuclei.classes[0].share = 9
    const second = complete({})
    expect(second.temperature.knots?.length).toBeGreaterThan(2)
    expect(second.channels).toHaveLength(3)
    expect(second.nuclei.classes[0].share).toBeLessThan(1)
  })
})

describe('a value that is not allowed', () => {
  it.each([
    [{ duration_h: -5 }, 'duration_h: -5 is not allowed; allowed: a number above 0, up to 10000'],
    [{ duration_h: Number.NaN }, 'duration_h: NaN is not allowed; allowed: a number above 0'],
    [{ duration_h: '6h' }, 'duration_h: "6h" is not allowed; allowed: a number above 0'],
    [{ duration_h: null }, 'duration_h: null is not allowed'],
    [
      { grid: { levels: 1e7 } },
      'grid.levels: 10000000 is not allowed; allowed: a whole number from 4 to 2000',
    ],
    [{ grid: { levels: 30.5 } }, 'grid.levels: 30.5 is not allowed; allowed: a whole number'],
    [
      { sizes: { classes: 401 } },
      'sizes.classes: 401 is not allowed; allowed: a whole number from 4 to 400',
    ],
    [
      { processes: { wind: 'yes' } },
      'processes.wind: "yes" is not allowed; allowed: true or false',
    ],
    [
      { ice: { saturation: 'murphy_koop' } },
      'ice.saturation: "murphy_koop" is not allowed; allowed: one of murphy_koop_2005, iapws_2011, marti_mauersberger_1993',
    ],
    [{ ice: { slip: 'davis' } }, 'did you mean davies?'],
    [
      { ice: { accommodation: 1.2 } },
      'ice.accommodation: 1.2 is not allowed; allowed: a number above 0, up to 1',
    ],
    [
      { waves: [{ amplitude_K: 5, period_h: 1 }] },
      'waves.0.vertical_wavelength_km: is missing; allowed: a number above 0',
    ],
    [{ waves: 3 }, 'waves: 3 is not allowed; allowed: a list of 0 to 500 values'],
    [
      { grid: [1] },
      'grid: [1] is not allowed; allowed: a mapping with the keys bottom_km, top_km, levels',
    ],
    [
      { start_utc: 'July' },
      'start_utc: "July" is not allowed; allowed: a UTC time such as 2026-07-01T00:00:00Z',
    ],
    [
      { channels: [{ name: 'UV', wavelength_nm: 260, geometry: 'albedo' }] },
      'channels.0.name: "UV" is not allowed; allowed: text of the form ^[a-z0-9]+(_[a-z0-9]+)*$',
    ],
    [
      { random_waves: { periods_h: [1] } },
      'random_waves.periods_h: [1] is not allowed; allowed: a list of 2 values',
    ],
    [
      {
        water: {
          knots: [
            { altitude_km: 70, water_ppmv: 1e6 },
            { altitude_km: 100, water_ppmv: 1 },
          ],
        },
      },
      'water.knots.0.water_ppmv: 1000000 is not allowed',
    ],
    [
      { temperature: { rebase_every_h: 1 } },
      'temperature.rebase_every_h: 1 is not allowed; allowed: a number from 24',
    ],
    ['text', 'the scenario: "text" is not allowed; allowed: a mapping'],
  ])('%j is refused', (document, message) => {
    expect(messageOf(document)).toContain(message)
  })

  it('suggests the nearest right key', () => {
    expect(messageOf({ duraton_h: 6 })).toMatch(
      /^duraton_h: unknown key; .*; did you mean duration_h\?$/,
    )
    expect(messageOf({ duration: 6 })).toContain('did you mean duration_h?')
    expect(messageOf({ water: { at_83_ppmv: 3 } })).toContain('did you mean at_83km_ppmv?')
  })

  it('names the allowed keys where none is near', () => {
    const message = messageOf({ grid: { colour: 1 } })
    expect(message).toBe('grid.colour: unknown key; allowed here: bottom_km, top_km, levels')
  })

  it('reports the first problems and counts the rest', () => {
    const waves = Array.from({ length: 4 }, () => ({}))
    const lines = messageOf({ waves }).split('\n')
    expect(lines).toHaveLength(7)
    expect(lines[6]).toBe('... and 6 more')
  })

  it('does not take inherited names for keys', () => {
    expect(messageOf({ constructor: 1 })).toContain('constructor: unknown key')
    expect(messageOf(JSON.parse('{"__proto__": {"duration_h": 6}}'))).toContain('unknown key')
  })
})
