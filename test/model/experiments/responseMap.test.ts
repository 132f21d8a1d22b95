import { describe, expect, it } from 'vitest'
import { changedDocument, parseChange } from '../../../src/model/experiments/change.ts'
import { alignedPair } from '../../../src/model/experiments/comparison.ts'
import {
  planResponseMap,
  type ResponseMapOptions,
  type ResponseMapPlan,
  type ResponseMapRow,
  responseMapTable,
} from '../../../src/model/experiments/responseMap.ts'
import type { MemberOutcome } from '../../../src/model/experiments/runMember.ts'
import { refusalOf, run, seriesOf, tinyNight } from './tinyNight.ts'

const night = tinyNight()
const OPTIONS: ResponseMapOptions = {
  quantity: 'temperature',
  amount: '-0.2K',
  bands_km: [82, 86, 2],
  onsets_h: [1, 1, 1],
  duration_h: 1,
}

function rayleigh(rows: ResponseMapRow[]): ResponseMapRow[] {
  return rows.filter(({ quantity }) => quantity === 'albedo_per_sr')
}

describe('a response map', () => {
  const plan = planResponseMap(night, OPTIONS)
  const rows = responseMapTable(
    plan,
    plan.members.map(({ document }) => run(document)),
  )
  const broadPlan = planResponseMap(night, { ...OPTIONS, bands_km: [82, 86, 4] })
  const broad = responseMapTable(
    broadPlan,
    broadPlan.members.map(({ document }) => run(document)),
  )

  it('has a row per cell, channel and brightness, and says per what', () => {
    expect(plan.words).toBe(
      'temperature lowered by 0.2 K between 82 and 84 km, from 1 to 2 h, and so on in 2 cells',
    )
    expect(plan.cells).toEqual([
      { band_km: [82, 84], onset_h: 1 },
      { band_km: [84, 86], onset_h: 1 },
    ])
    expect(plan.members.map(({ role, cell }) => `${role} ${cell}`)).toEqual([
      'control null',
      'tight control null',
      'changed 0',
      'half 0',
      'tight changed 0',
      'changed 1',
      'half 1',
      'tight changed 1',
    ])
    expect(rows).toHaveLength(4)
    expect(rows[3]).toMatchObject({
      band_bottom_km: 84,
      band_top_km: 86,
      onset_h: 1,
      quantity: 'albedo_mie_per_sr',
      channel: '532nm',
      per: 'K',
      flagged: null,
    })
    expect(rows.every(({ response, floor }) => Math.abs(response ?? 0) > (floor ?? Infinity))).toBe(
      true,
    )
  })

  it('agrees with direct runs of each change', () => {
    rayleigh(rows).forEach((row, cell) => {
      const text = `temperature:-0.2K@${plan.cells[cell].band_km.join('..')}km@1..2h`
      const pair = alignedPair(night, [changedDocument(night, parseChange(text))])
      const [control, changed] = [pair.control, pair.changed[0]].map((document) =>
        Math.log(seriesOf(run(document).headlines, 'albedo_per_sr').at(-1) ?? Number.NaN),
      )
      expect(row.response).toBeCloseTo((changed - control) / -0.2, 12)
    })
  })

  it('adds up over bands to one broad change, within the stated nonlinearity', () => {
    const parts = rayleigh(rows)
    const [whole] = rayleigh(broad)
    const sum = parts.reduce((total, { response }) => total + (response ?? Number.NaN), 0)
    // A quadratic part q a of the response shows half of itself in the halving: 2 x nonlinearity x response.
    const allowed = [whole, ...parts].reduce(
      (total, { response, nonlinearity, floor }) =>
        total + 2 * Math.abs(response ?? 0) * (nonlinearity ?? 0) + (floor ?? 0),
      0,
    )
    expect(Math.abs(sum - (whole.response ?? Number.NaN))).toBeLessThan(allowed)
    expect(allowed).toBeLessThan(0.1 * Math.abs(whole.response ?? 0))
  })

  it('shows what the trade expects: a warmer layer of ice is dimmer', () => {
    expect(rayleigh(broad)[0].response).toBeLessThan(0)
  })

  it('counts a factor per percent, and looks at a mean where asked', () => {
    const water = planResponseMap(night, {
      ...OPTIONS,
      quantity: 'water',
      amount: '+4%',
      bands_km: [82, 86, 4],
      when: { mean_h: [2, 3] },
    })
    expect(water).toMatchObject({ per: 'percent', when: { mean_h: [2, 3] } })
    expect(water.amount).toBeCloseTo(4, 12)
    const outcomes = water.members.map(({ document }) => run(document))
    const [row] = rayleigh(responseMapTable(water, outcomes))
    const brightness = [0, 2].map((member) => {
      const last = seriesOf(outcomes[member].headlines, 'albedo_per_sr').slice(-3)
      return Math.log((last[0] + last[1] + last[2]) / 3)
    })
    expect(row.response).toBeCloseTo((brightness[1] - brightness[0]) / 4, 12)
    expect(water.members[3].document.perturbations[0].factor).toBeCloseTo(1.02, 12)
  })

  it('flags, and does not report, cells before whose onset the cloud was looked at', () => {
    const late = planResponseMap(night, { ...OPTIONS, bands_km: [82, 84, 2], when: { at_h: 1 } })
    const table = responseMapTable(
      late,
      late.members.map(({ document }) => run(document)),
    )
    expect(table.map(({ response, floor, flagged }) => [response, floor, flagged])).toEqual([
      [null, 0, 'below floor'],
      [null, 0, 'below floor'],
    ])
  })
})

describe('the table of a response map', () => {
  const plan = planResponseMap(night, { ...OPTIONS, bands_km: [82, 84, 2] })

  /** Outcomes with invented brightness in the order of the members: control, tight, changed, half, tight changed. */
  function outcomes(brightness: (number | null)[]): (MemberOutcome | null)[] {
    return brightness.map((value) => {
      if (value === null) return { status: 'failed', reason: 'invented' }
      const series = ['albedo_per_sr', 'albedo_mie_per_sr'].map((quantity) => ({
        quantity,
        channel: '532nm',
        values: [0, value],
      }))
      const solver = { evaluations: 0, acceptedSteps: 0, largestStep_s: 0 }
      return {
        status: 'done',
        headlines: { time_h: [0, 3], series },
        diagnostics: {},
        warnings: [],
        scenes: [],
        solver,
      }
    })
  }

  it('gives response, floor and nonlinearity', () => {
    const [row] = responseMapTable(plan, outcomes([0, 0.1, 0.2, 0.05, 0.28].map(Math.exp)))
    // (0.2 - 0)/-0.2, |(0.2 - 0) - (0.28 - 0.1)|/0.2, and 0.2/0.1 - 1.
    expect(row.response).toBeCloseTo(-1, 12)
    expect(row.floor).toBeCloseTo(0.1, 12)
    expect(row.nonlinearity).toBeCloseTo(1, 12)
    expect(row.flagged).toBeNull()
  })

  it.each([
    ['below floor', [0, 0, 0.1, 0.05, 0.3].map(Math.exp), 1],
    ['no cloud', [1, 1, 0, 1, 1], null],
    ['failed', [1, 1, 2, null, 2], null],
  ] as const)('flags a cell that is %s', (flagged, brightness, floor) => {
    const [row] = responseMapTable(plan, outcomes([...brightness]))
    expect(row).toMatchObject({ response: null, nonlinearity: null, flagged })
    if (floor === null) expect(row.floor).toBeNull()
    else expect(row.floor).toBeCloseTo(floor, 12)
  })

  it('flags all cells while nothing has run', () => {
    const rows = responseMapTable(plan, [])
    expect(rows.map(({ flagged }) => flagged)).toEqual(['failed', 'failed'])
  })
})

describe('the plan of a response map', () => {
  it('meets every onset in every run', () => {
    const plan: ResponseMapPlan = planResponseMap(night, { ...OPTIONS, onsets_h: [0, 0.9, 0.3] })
    expect(plan.cells.slice(0, 4).map(({ onset_h }) => onset_h)).toEqual([0, 0.3, 0.6, 0.9])
    for (const { document } of plan.members) {
      expect(document.numerics.break_points_h).toEqual([0.3, 0.6, 0.9, 1, 1.3, 1.6, 1.9])
    }
  })

  it('has a default amount for every quantity', () => {
    const pers = (['temperature', 'water', 'wind', 'mixing', 'nuclei'] as const).map((quantity) => {
      const { amount: _, ...rest } = OPTIONS
      const { amount, per } = planResponseMap(night, { ...rest, quantity })
      return `${Number(amount.toPrecision(6))} ${per}`
    })
    expect(pers).toEqual(['1 K', '5 percent', '0.5 cm/s', '10 percent', '10 percent'])
  })

  it.each<[Partial<ResponseMapOptions>, string]>([
    [{ amount: '1K' }, "amount '1K': expected an amount with sign and unit or a factor"],
    [{ amount: '+0K' }, "amount '+0K' changes nothing; expected one that does"],
    [{ duration_h: 0 }, 'duration 0 h; expected above 0'],
    [
      { bands_km: [70, 78, 4] },
      "change 'temperature:-0.2K@70..74km': the band from 70 to 74 km reaches out of the column; allowed: inside 77 to 96 km",
    ],
    [
      { bands_km: [82, 86, 3] },
      'bands from 82 to 86 km in steps of 3 km; expected 0 <= from <= to and whole steps between',
    ],
    [{ bands_km: [86, 82, 2] }, 'bands from 86 to 82 km in steps of 2 km'],
    [{ bands_km: [82, 82, 2] }, 'bands from 82 to 82 km are empty'],
    [
      { bands_km: [82, 86, 0.5] },
      'bands of 0.5 km are thinner than a level; allowed: from 0.95 km on',
    ],
    [{ onsets_h: [0, 3, 1] }, 'the onset at 3 h is not inside the run; allowed: below 3 h'],
    [{ onsets_h: [0, 1, 0] }, 'onsets from 0 to 1 h in steps of 0 h'],
    [{ bands_km: [80, 90, 1], onsets_h: [0, 2.9, 0.001] }, '29010 cells; allowed: up to 10000'],
    [{ when: { at_h: 2.2 } }, 'no output at 2.2 h; output comes every 30 min up to 3 h'],
    [
      { when: { mean_h: [3.1, 4] } },
      'no output from 3.1 to 4 h; output comes every 30 min up to 3 h',
    ],
  ])('is refused for %j', (change, message) => {
    expect(refusalOf(() => planResponseMap(night, { ...OPTIONS, ...change }))).toContain(
      `InputError: ${message}`,
    )
  })
})
