import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  changedDocument,
  describePerturbations,
  parseChange,
} from '../../../src/model/experiments/change.ts'
import { refusalOf, run, tinyNight } from './tinyNight.ts'

const always = { time: { shape: 'always' } }

describe('a change in its short form', () => {
  it.each([
    ['temperature:+1K', { quantity: 'temperature', add_K: 1, ...always }],
    ['temperature:-0.5K', { quantity: 'temperature', add_K: -0.5, ...always }],
    ['water:+10%', { quantity: 'water', factor: 1.1, ...always }],
    ['water:x1.2', { quantity: 'water', factor: 1.2, ...always }],
    ['water:+0.5ppmv', { quantity: 'water', add_ppmv: 0.5, ...always }],
    ['wind:+0.07m/s', { quantity: 'wind', add_cm_per_s: 7, ...always }],
    ['wind:+1cm/s', { quantity: 'wind', add_cm_per_s: 1, ...always }],
    ['wind:x-1', { quantity: 'wind', factor: -1, ...always }],
    ['mixing:+5m2/s', { quantity: 'mixing', add_m2_per_s: 5, ...always }],
    ['nuclei:+100/cm3', { quantity: 'nuclei', add_per_cm3: 100, ...always }],
    ['nuclei:-14%', { quantity: 'nuclei', factor: 0.86, ...always }],
    [
      'temperature:+1K@82..84.5km',
      { quantity: 'temperature', add_K: 1, altitude: { from_km: 82, to_km: 84.5 }, ...always },
    ],
    [
      'temperature:+1K@3..9h',
      { quantity: 'temperature', add_K: 1, time: { shape: 'pulse', start_h: 3, end_h: 9 } },
    ],
    [
      'temperature:+1K@3..h',
      { quantity: 'temperature', add_K: 1, time: { shape: 'step', start_h: 3 } },
    ],
    [
      ' temperature : +1 K @ ..9 h @ 82..84 km ',
      {
        quantity: 'temperature',
        add_K: 1,
        altitude: { from_km: 82, to_km: 84 },
        time: { shape: 'pulse', start_h: 0, end_h: 9 },
      },
    ],
  ])('%s is read', (text, perturbation) => {
    expect(parseChange(text)).toMatchObject({ text, perturbations: [perturbation] })
    expect(Object.keys(parseChange(text).perturbations[0]).sort()).toEqual(
      Object.keys(perturbation).sort(),
    )
  })

  it.each([
    ['temperature:+1K', 'temperature raised by 1 K in the whole column, during the whole run'],
    [
      'temperature:-0.5K@82..84km@3..9h',
      'temperature lowered by 0.5 K between 82 and 84 km, from 3 to 9 h',
    ],
    ['temperature:+0K', 'temperature changed by 0 K in the whole column, during the whole run'],
    [
      'water:+10%@..6h',
      'water vapour multiplied by 1.1 (+10 %) in the whole column, from 0 to 6 h',
    ],
    ['wind:x-2@4..h', 'vertical wind multiplied by -2 in the whole column, from 4 h on'],
    [
      'mixing:+5m2/s',
      'eddy diffusivity raised by 5 m2/s in the whole column, during the whole run',
    ],
    [
      'nuclei:-100/cm3',
      'number of nuclei lowered by 100 /cm3 in the whole column, during the whole run',
    ],
  ])('%s is echoed in plain words', (text, words) => {
    expect(parseChange(text).words).toBe(words)
  })

  it('keeps any amount, band and window to the last digit', () => {
    const decimal = (max: number) => fc.integer({ min: 0, max: max * 1000 }).map((n) => n / 1000)
    fc.assert(
      fc.property(
        fc.boolean(),
        decimal(100),
        fc.tuple(decimal(150), decimal(150)).filter(([a, b]) => a !== b),
        fc.tuple(decimal(48), decimal(48)).filter(([a, b]) => a !== b),
        (cools, amount, band, window) => {
          const [from_km, to_km] = band.sort((a, b) => a - b)
          const [start_h, end_h] = window.sort((a, b) => a - b)
          const sign = cools ? '-' : '+'
          const parts = [`${from_km}..${to_km}km`, `${start_h}..${end_h}h`]
          for (const order of [parts, parts.toReversed()]) {
            const [read] = parseChange(
              `temperature:${sign}${amount}K@${order.join('@')}`,
            ).perturbations
            expect(read).toEqual({
              quantity: 'temperature',
              add_K: cools && amount > 0 ? -amount : amount,
              altitude: { from_km, to_km },
              time: { shape: 'pulse', start_h, end_h },
            })
          }
        },
      ),
      { seed: 1 },
    )
  })

  it('refuses any other text with what was read, and never breaks', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 40 }), (text) => {
        expect(refusalOf(() => parseChange(text))).toContain(`InputError: change '${text}': `)
      }),
      { seed: 2 },
    )
  })

  it.each([
    [
      'temprature:+1K',
      "no quantity 'temprature'; expected one of temperature, water, wind, mixing, nuclei; did you mean temperature?",
    ],
    ['ice:+1K', "no quantity 'ice'; expected one of temperature, water, wind, mixing, nuclei"],
    [
      'temperature',
      'expected QUANTITY:AMOUNT[@Z1..Z2km][@T1..T2h], such as temperature:+1K@82..84km@3..9h',
    ],
    [
      'temperature:1K',
      "read '1K' as the amount; expected an amount with sign and unit or a factor, such as +1K, -0.5K, +1% or x1.01",
    ],
    ['temperature:+1', "read '+1' as the amount; expected"],
    [
      'water:+1K',
      "read '+1K' as the amount; expected an amount with sign and unit or a factor, such as +0.5ppmv, +10% or x1.2",
    ],
    [
      'temperature:+1K@82..84',
      "read '@82..84'; expected one band such as @82..84km, one time such as @3..9h",
    ],
    ['temperature:+1K@82..84km@85..86km', "read '@85..86km' a second time; expected one band"],
    ['temperature:+1K@1..2h@3..4h', "read '@3..4h' a second time; expected one band"],
    ['temperature:+1K@84..82km', 'band 84..82km is empty; expected the lower altitude first'],
    ['temperature:+1K@9..3h', 'time 9..3h is empty; expected the earlier time first'],
    ['temperature:+1K@..h', "time '..h' has no limits; expected @3..9h, @3..h or @..9h"],
    ['temperature:+1e999K', "read '+1e999K' as the amount"],
  ])('%s is refused: %s', (text, message) => {
    expect(refusalOf(() => parseChange(text))).toContain(`InputError: change '${text}': ${message}`)
  })
})

describe('perturbations from a file', () => {
  it('are described as well', () => {
    expect(
      describePerturbations([
        {
          quantity: 'temperature',
          add_K: 2,
          altitude: { centre_km: 83, width_km: 2 },
          time: { shape: 'ramp', start_h: 3, end_h: 9, rise_h: 1 },
        },
        { quantity: 'water', factor: 3, time: { shape: 'ramp', start_h: 3, rise_h: 1 } },
      ]),
    ).toBe(
      'temperature raised by 2 K around 83 km (Gaussian, 2 km wide at half maximum), from 3 to 9 h, rising and falling over 1 h; ' +
        'water vapour multiplied by 3 in the whole column, from 3 h on, rising over 1 h',
    )
    expect(describePerturbations([])).toBe('no change')
  })
})

describe('a changed scenario', () => {
  it('equals the one with the same change written into it, document and run', () => {
    const changed = changedDocument(tinyNight(), parseChange('temperature:-2K@82..86km@1..2h'))
    const written = tinyNight({
      perturbations: [
        {
          quantity: 'temperature',
          add_K: -2,
          altitude: { from_km: 82, to_km: 86 },
          time: { shape: 'pulse', start_h: 1, end_h: 2 },
        },
      ],
    })
    expect(changed).toEqual(written)
    expect(run(changed)).toEqual(run(written))
  })

  it('keeps the perturbations that were there', () => {
    const night = changedDocument(tinyNight(), parseChange('water:+10%'))
    const twice = changedDocument(night, parseChange('wind:+1cm/s'))
    expect(twice.perturbations.map(({ quantity }) => quantity)).toEqual(['water', 'wind'])
    expect(night.perturbations).toHaveLength(1)
  })

  it.each([
    [
      'temperature:+1K@70..84km',
      'the band from 70 to 84 km reaches out of the column; allowed: inside 77 to 96 km',
    ],
    [
      'temperature:+1K@90..97km',
      'the band from 90 to 97 km reaches out of the column; allowed: inside 77 to 96 km',
    ],
    ['temperature:+1K@3..9h', 'it acts 3 to 9 h, outside the run, which goes from 0 to 3 h'],
    ['temperature:+1K@5..h', 'it acts from 5 h on, outside the run, which goes from 0 to 3 h'],
    [
      'temperature:+1000K',
      'perturbations.0.add_K: 1000 is not allowed; allowed: a number from -500 to 500',
    ],
    ['water:-200%', 'perturbations.0.factor: -1 is not allowed; allowed: 0 or more'],
  ])('%s is refused: %s', (text, message) => {
    expect(refusalOf(() => changedDocument(tinyNight(), parseChange(text)))).toBe(
      `InputError: change '${text}': ${message}`,
    )
  })

  it('may have a Gaussian band whose tails leave the column', () => {
    const altitude = { centre_km: 95, width_km: 6 }
    const perturbations = [
      { quantity: 'temperature' as const, add_K: 1, altitude, time: { shape: 'always' as const } },
    ]
    expect(
      changedDocument(tinyNight(), { text: 'file', perturbations }).perturbations[0].altitude,
    ).toEqual(altitude)
  })
})
