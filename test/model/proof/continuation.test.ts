import { describe, expect, it } from 'vitest'
import { type Column, type Snapshot, simulate } from '../../../src/model/simulate.ts'
import { columnOf, statesOf, uniform } from '../../support/column.ts'

/** A run with a wave, jumps of water and nuclei at and between output times, and a daily re-basing. */
function eventfulColumn(): Column {
  return columnOf({
    grid: { levels: 20 },
    sizes: { classes: 12 },
    duration_h: 27,
    output_every_min: 180,
    temperature: {
      series: [0, 48].map((time_h) => ({
        time_h,
        ...uniform('temperature_K', 142 - time_h / 10),
      })),
    },
    waves: [{ amplitude_K: 3, period_h: 2, vertical_wavelength_km: 12 }],
    perturbations: [
      { quantity: 'water', add_ppmv: 1, time: { shape: 'step', start_h: 6 } },
      { quantity: 'nuclei', factor: 2, time: { shape: 'pulse', start_h: 7.5, end_h: 9 } },
      {
        quantity: 'water',
        add_ppmv: 1,
        time: { shape: 'ramp', start_h: 10, rise_h: 2, end_h: 20 },
      },
    ],
  })
}

describe('simulate', () => {
  const states = statesOf(eventfulColumn())

  it('hands out the start and every output time', () => {
    expect(states.map(({ time_s }) => time_s / 3600)).toEqual([0, 3, 6, 9, 12, 15, 18, 21, 24, 27])
  })

  it.each([3, 6, 9, 12, 24])('goes on from the state at %d h to the very same end', (hours) => {
    const saved = states.find(({ time_s }) => time_s === 3600 * hours) as Snapshot
    const column = eventfulColumn()
    const rest = statesOf(column, structuredClone(saved))
    const last = rest[rest.length - 1]
    expect(last.time_s).toBe(27 * 3600)
    expect(last.y).toEqual(states[states.length - 1].y)
  })

  it('gives a place to stop between solver steps', () => {
    const run = simulate(eventfulColumn())
    const kinds = Array.from({ length: 6 }, () => run.next().value)
    expect(kinds[0]).toMatchObject({ kind: 'state', snapshot: { time_s: 0 } })
    for (const event of kinds.slice(1)) expect(event).toMatchObject({ kind: 'step' })
  })

  it('leaves a handed-out state alone while it goes on', () => {
    const column = eventfulColumn()
    const run = simulate(column)
    const first = run.next().value as { kind: 'state'; snapshot: Snapshot }
    const copy = first.snapshot.y.slice()
    while (run.next().done !== true);
    expect(first.snapshot.y).toEqual(copy)
  })
})
