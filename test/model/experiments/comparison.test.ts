import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { changedDocument, parseChange } from '../../../src/model/experiments/change.ts'
import {
  alignedPair,
  compareHeadlines,
  onsetOf,
  type ResponseRow,
  summariseResponse,
  tightened,
} from '../../../src/model/experiments/comparison.ts'
import type { Headlines } from '../../../src/model/experiments/headlines.ts'
import { resolve } from '../../../src/model/scenario/resolve.ts'
import type { ScenarioDocument } from '../../../src/model/scenario/schema.ts'
import { prepareColumn } from '../../../src/model/simulate.ts'
import { refusalOf, run, tinyNight } from './tinyNight.ts'

const changed = (night: ScenarioDocument, text: string) => changedDocument(night, parseChange(text))
const breakPoints = (document: ScenarioDocument) =>
  prepareColumn(resolve(document).scenario).atmosphere.breakPoints_s

describe('aligned runs', () => {
  it.each([
    'temperature:+0K@82..86km@0.7..1.9h',
    'water:x1@1.1..h',
    'nuclei:+0%',
    'wind:+0cm/s@..2.3h',
  ])('are equal to the last bit where the change is nothing: %s', (text) => {
    const night = tinyNight()
    const pair = alignedPair(night, [changed(night, text)])
    const [control, other] = [run(pair.control), run(pair.changed[0])]
    expect(other).toEqual(control)
    const rows = compareHeadlines(control.headlines, other.headlines)
    expect(rows.filter(({ difference }) => difference !== 0 && difference !== null)).toEqual([])
    expect(rows.some(({ difference }) => difference === 0)).toBe(true)
  })

  it('record the break points of all of them, beside those that were asked for', () => {
    const night = tinyNight({ numerics: { break_points_h: [0.25] } })
    const pair = alignedPair(night, [
      changed(night, 'temperature:+1K@1..2h'),
      changed(night, 'water:+5%@0.7..2h'),
    ])
    for (const document of [pair.control, ...pair.changed]) {
      expect(document.numerics.break_points_h).toEqual([0.25, 0.7, 1, 2])
      expect(breakPoints(document)).toEqual(breakPoints(pair.control))
    }
    expect(night.numerics.break_points_h).toEqual([0.25])
  })

  it('do not list what all meet by themselves', () => {
    const wave = { amplitude_K: 2, period_h: 2, vertical_wavelength_km: 10, start_h: 0.1 }
    const night = tinyNight({ waves: [wave] })
    expect(alignedPair(night, [night]).control.numerics.break_points_h).toEqual([])
  })

  it('meet equal instants for any window that users write', () => {
    const hundredths = fc.integer({ min: 1, max: 299 }).map((n) => n / 100)
    const night = tinyNight()
    fc.assert(
      fc.property(hundredths, hundredths, (a, b) => {
        fc.pre(a !== b)
        const window = `${Math.min(a, b)}..${Math.max(a, b)}h`
        const pair = alignedPair(night, [changed(night, `temperature:+1K@${window}`)])
        expect(breakPoints(pair.control)).toEqual(breakPoints(pair.changed[0]))
      }),
      { seed: 3, numRuns: 50 },
    )
  })

  it('are refused when their output times differ', () => {
    const refusal = refusalOf(() =>
      alignedPair(tinyNight(), [tinyNight({ output_every_min: 20, duration_h: 2 })]),
    )
    expect(refusal).toBe(
      'InputError: the output times differ: every 30 min over 3 h in the control, every 20 min over 2 h in the changed run; expected equal ones',
    )
  })
})

describe('tightened tolerances', () => {
  it('are divided by the factor, and nothing else changes', () => {
    const night = tinyNight()
    const { numerics, ...rest } = tightened(night, 10)
    expect({ ...rest, numerics: night.numerics }).toEqual(night)
    expect(numerics.relative_tolerance).toBe(night.numerics.relative_tolerance / 10)
    expect(numerics.absolute_tolerance_ice_per_m3).toBe(0.1)
    expect(numerics.absolute_tolerance_vapour_per_m3).toBe(1e8)
  })

  it('stop at what a scenario allows', () => {
    const fine = tinyNight({ numerics: { relative_tolerance: 1e-11 } })
    expect(tightened(fine).numerics.relative_tolerance).toBe(1e-12)
  })
})

function headlines(values: number[], time_h = values.map((_, i) => i)): Headlines {
  return { time_h, series: [{ quantity: 'column_ice_ug_per_m2', channel: null, values }] }
}

describe('a comparison of headlines', () => {
  it('gives differences and ratios, and null where there is nothing to compare', () => {
    const rows = compareHeadlines(headlines([0, 2, Number.NaN, 4]), headlines([1, 3, 1, 4]))
    expect(rows).toEqual(
      [
        { time_h: 0, control: 0, changed: 1, difference: 1, relative: null },
        { time_h: 1, control: 2, changed: 3, difference: 1, relative: 0.5 },
        { time_h: 2, control: null, changed: 1, difference: null, relative: null },
        { time_h: 3, control: 4, changed: 4, difference: 0, relative: 0 },
      ].map((row) => ({ quantity: 'column_ice_ug_per_m2', channel: null, floor: null, ...row })),
    )
  })

  it('measures the floor of the difference with a tighter pair, and gives no ratio to a control below its own', () => {
    const tight = { control: headlines([2.5, 2.25]), changed: headlines([3, 3.5]) }
    const rows = compareHeadlines(headlines([0.25, 2]), headlines([1, 3]), tight)
    // 0.75 against 0.5 and 1 against 1.25; the first control moves by 2.25, more than it is.
    expect(rows.map(({ floor }) => floor)).toEqual([0.25, 0.25])
    expect(rows.map(({ relative }) => relative)).toEqual([null, 0.5])
  })

  it('takes the quantities and channels that both runs have', () => {
    const more: Headlines = {
      time_h: [0],
      series: [
        { quantity: 'albedo_per_sr', channel: 'a', values: [1] },
        { quantity: 'albedo_per_sr', channel: 'b', values: [2] },
      ],
    }
    const fewer = { ...more, series: [{ quantity: 'albedo_per_sr', channel: 'b', values: [3] }] }
    expect(
      compareHeadlines(more, fewer).map(({ channel, difference }) => [channel, difference]),
    ).toEqual([['b', 1]])
  })

  it.each([
    [[0, 1, 2.5], 'number 3 is 2 h in the control and 2.5 h in the changed run'],
    [[0, 1], 'number 3 is 2 h in the control and missing in the changed run'],
    [[0, 1, 2, 3], 'number 4 is missing in the control and 3 h in the changed run'],
  ])('is refused for other output times: %j', (times, message) => {
    const refusal = refusalOf(() =>
      compareHeadlines(
        headlines([1, 1, 1]),
        headlines(
          times.map(() => 1),
          times,
        ),
      ),
    )
    expect(refusal).toBe(`InputError: the output times differ: ${message}; expected equal ones`)
  })
})

describe('the summary of a response', () => {
  const row = (
    time_h: number,
    difference: number | null,
    floor: number | null = null,
  ): ResponseRow => ({
    time_h,
    quantity: 'albedo_per_sr',
    channel: '532nm',
    control: 10,
    changed: null,
    difference,
    relative: difference === null ? null : difference / 10,
    floor,
  })

  it('gives size, integral, delay and duration of a triangle', () => {
    // Rises from 0 at 2 h to -4 at 4 h and is gone at 6 h: half of it between 3 and 5 h, area 8.
    const rows = [0, 0, 0, -2, -4, -2, 0].map((difference, i) => row(i, difference, 0.5))
    expect(summariseResponse(rows, 1)).toEqual([
      {
        quantity: 'albedo_per_sr',
        channel: '532nm',
        largest: -4,
        largest_relative: -0.4,
        largest_at_h: 4,
        integrated: -8,
        delay_h: 2,
        duration_h: 2,
        floor: 0.5,
        above_floor: true,
      },
    ])
  })

  it('interpolates between output times', () => {
    const [summary] = summariseResponse([row(0, 0), row(1, 4), row(2, 4), row(3, 0)])
    expect(summary).toMatchObject({ delay_h: 0.5, duration_h: 2, integrated: 8, above_floor: null })
  })

  it('says that a response below the floor is none', () => {
    const [summary] = summariseResponse([row(0, 0, 0), row(1, 1, 0.1), row(2, 0, 2)])
    expect(summary).toMatchObject({ largest: 1, floor: 2, above_floor: false })
  })

  it('has no delay where nothing responds, and no numbers where nothing is known', () => {
    const [still] = summariseResponse([row(0, 0), row(1, 0)])
    expect(still).toMatchObject({
      largest: 0,
      largest_at_h: null,
      delay_h: null,
      duration_h: null,
      integrated: 0,
    })
    const [unknown] = summariseResponse([row(0, null), row(1, null)])
    expect(unknown).toMatchObject({ largest: null, integrated: null, delay_h: null })
  })

  it('knows the onset of a change', () => {
    const at = (text: string) => parseChange(text).perturbations
    expect(onsetOf([...at('temperature:+1K@3..9h'), ...at('water:+5%@2..h')])).toBe(2)
    expect(onsetOf([...at('temperature:+1K@3..9h'), ...at('water:+5%')])).toBe(0)
    expect(onsetOf([])).toBe(0)
  })

  it('finds a real response of a cooled cloud above the floor', () => {
    const night = tinyNight()
    const pair = alignedPair(night, [changed(night, 'temperature:-2K@1..2h')])
    const documents = [pair.control, pair.changed[0]]
    const [control, other] = documents.map((document) => run(document).headlines)
    const [tightControl, tightOther] = documents.map((one) => run(tightened(one)).headlines)
    const rows = compareHeadlines(control, other, { control: tightControl, changed: tightOther })
    const albedo = summariseResponse(rows, 1).find(({ quantity }) => quantity === 'albedo_per_sr')
    expect(albedo?.above_floor).toBe(true)
    // Ice grows in colder air: the expectation of the trade.
    expect(albedo?.largest).toBeGreaterThan(0)
    expect(rows.filter(({ time_h, difference }) => time_h <= 1 && (difference ?? 0) !== 0)).toEqual(
      [],
    )
  })
})
