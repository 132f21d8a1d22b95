import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { loadScenario } from '../../src/io/scenario/loadScenario.ts'
import { shippedNames } from '../../src/io/scenario/scenarioLayers.ts'
import { resolve } from '../../src/model/scenario/resolve.ts'
import type { Scenario } from '../../src/model/scenario/types.ts'
import { type Column, prepareColumn, type Snapshot, simulate } from '../../src/model/simulate.ts'
import { type ColumnTotals, columnTotals } from '../../src/model/state/columnTotals.ts'
import { NUCLEUS_ACCOUNTS, WATER_ACCOUNTS } from '../../src/model/state/layout.ts'

const directory = fileURLToPath(new URL('../../scenarios/', import.meta.url))
const names = shippedNames(directory)

const load = (name: string) =>
  loadScenario(name, { set: [], shippedDirectory: directory, workingDirectory: directory })

/** Warnings that a scenario gives on purpose; every other one gives none. */
const expectedWarnings: Record<string, string[]> = {}

describe('the shipped scenarios', () => {
  it('are the quiet night and what departs from it', () => {
    expect(names).toEqual([
      'closed-box',
      'dry',
      'dust-poor',
      'dust-rich',
      'pure-fall',
      'quiet-night',
      'random-waves',
      'reference-2007',
      'season-opening',
      'warm-pulse',
      'wave-one-hour',
      'wave-twelve-hours',
      'waves-two-and-five-days',
      'wet',
    ])
  })

  it('spell out the defaults in the quiet night', () => {
    const { scenario } = load('quiet-night')
    expect({ ...scenario, title: '' }).toEqual({ ...resolve({}).scenario, title: '' })
  })

  // Digits of the published table at 70, 88 and 100 km (doi 10.5194/acpd-7-9973-2007, read in a public copy).
  it('carry the published reference atmosphere, cooled by 4 K', () => {
    const { temperature_K, water } = load('reference-2007').scenario.background
    const rows = [70e3, 88e3, 100e3].map((z) => temperature_K.altitudes_m.indexOf(z))
    expect(temperature_K.altitudes_m).toHaveLength(31)
    // Rounding of decimal fractions, 1e-9 K.
    const temperatures = rows.map((row) => temperature_K.values[0][row])
    ;[209.7, 135.6, 182.3].forEach((published, i) => {
      expect(temperatures[i]).toBeCloseTo(published - 4, 9)
    })
    ;[6.5, 1.47, 0.412].forEach((published, i) => {
      expect(water.values[0][rows[i]] * 1e6).toBeCloseTo(published, 9)
    })
  })
})

describe.each(names)('scenario %s', (name) => {
  const text = readFileSync(`${directory}${name}.yaml`, 'utf8')

  it('opens with its question and the origin of its numbers', () => {
    expect(text).toMatch(/^# Question: .+\?\n# Origin: .+/)
    const { document } = load(name)
    expect(document.title).not.toBe('untitled')
    expect(text.replace(/\n# /g, ' ')).toContain(`# Question: ${document.question}`)
    expect(text).toMatch(/^origin: /m)
    expect(document.origin).toMatch(/invented/i)
  })

  it('loads without warnings beyond those named', () => {
    expect(load(name).warnings).toEqual(expectedWarnings[name] ?? [])
  })

  it('conserves water and every class of nuclei in its first hours', () => {
    const column = prepareColumn(firstHours(load(name).scenario))
    const states = [...simulate(column)].flatMap((event) =>
      event.kind === 'state' ? [event.snapshot] : [],
    )
    expect(states.at(-1)?.time_s).toBe(column.scenario.duration_s)
    for (const state of states.slice(1)) {
      // Rounding of some thousand steps; the design of the budget leaves nothing else.
      expect(Math.max(...imbalances(column, states[0], state))).toBeLessThan(1e-12)
      expect(negativeIce(column, state)).toBeLessThan(1e-9)
    }
  })
})

/** The scenario on a small grid, at most 6 h long. */
function firstHours(scenario: Scenario): Scenario {
  const { duration_s, grid, sizes } = scenario
  return {
    ...scenario,
    duration_s: Math.min(duration_s, 6 * 3600),
    outputInterval_s: 3600,
    grid: { ...grid, levels: Math.min(grid.levels, 60) },
    sizes: { ...sizes, classes: Math.min(sizes.classes, 24) },
  }
}

/** What is missing of water and of each nucleus class, over the greater of initial column and throughput. */
function imbalances(column: Column, first: Snapshot, last: Snapshot): number[] {
  const { waterAccount, nucleusAccount, nucleusClasses } = column.layout
  const [before, after] = [columnTotals(first.y, column), columnTotals(last.y, column)]
  const water = ({ vapour, ice }: ColumnTotals) => vapour + ice
  const accounts = (indices: number[]) => indices.map((index) => last.y[index])
  const imbalance = (start: number, end: number, entered: number[]) => {
    const net = entered.reduce((sum, amount) => sum + amount, 0)
    const throughput = entered.reduce((sum, amount) => sum + Math.abs(amount), 0)
    return Math.abs(end - start - net) / Math.max(start, throughput)
  }
  const ofWater = accounts(WATER_ACCOUNTS.map((account) => waterAccount[account]))
  return [
    imbalance(water(before), water(after), ofWater),
    ...Array.from({ length: nucleusClasses }, (_, j) => {
      const ofClass = accounts(NUCLEUS_ACCOUNTS.map((account) => nucleusAccount[account] + j))
      return imbalance(before.nuclei[j], after.nuclei[j], ofClass)
    }),
  ]
}

/** Water in ice classes with negative numbers, over all water of the column. */
function negativeIce({ layout, sizes, grid, ...rest }: Column, { y }: Snapshot): number {
  const negative = Array.from(y.slice(layout.ice, layout.cores), (number, i) =>
    number < 0 ? -number * sizes.molecules[i % layout.classes] * grid.spacing_m : 0,
  ).reduce((sum, amount) => sum + amount, 0)
  const { vapour, ice } = columnTotals(y, { layout, sizes, grid, ...rest })
  return negative / (vapour + ice)
}
