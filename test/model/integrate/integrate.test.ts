import { describe, expect, it } from 'vitest'
import { ModelError } from '../../../src/model/errors.ts'
import { makeIntegrator } from '../../../src/model/integrate/integrate.ts'
import { initialSnapshot } from '../../../src/model/simulate.ts'
import type { Tendency } from '../../../src/model/tendency/tendency.ts'
import { columnOf } from '../../support/column.ts'

const column = columnOf({ grid: { levels: 20 }, sizes: { classes: 12 } })
const interval = { from_s: 0, to_s: 600 }

function failureOf(evaluate: Tendency['evaluate'], maxStepsPerInterval = 1000): ModelError {
  const numerics = { ...column.scenario.numerics, maxStepsPerInterval }
  const tight = { ...column, scenario: { ...column.scenario, numerics } }
  const integrator = makeIntegrator(tight, { enter() {}, evaluate })
  try {
    for (const _ of integrator.over(interval, initialSnapshot(column)));
  } catch (error) {
    if (error instanceof ModelError) return error
    throw error
  }
  throw new Error('the integration went through')
}

describe('the integrator', () => {
  it('stops at a number that is none, naming time, altitude and quantity', () => {
    const level = 7
    const { message, place, exitCode } = failureOf((time_s, _y, dy) => {
      dy.fill(0)
      if (time_s > 100) dy[column.layout.vapour + level] = Number.NaN
    })
    expect(message).toBe('water vapour became NaN')
    expect(place.quantity).toBe('water vapour')
    expect(place.altitude_m).toBe(column.grid.centres_m[level])
    expect(place.time_s).toBeGreaterThan(100)
    expect(exitCode).toBe(1)
  })

  it('names the class of ice that failed', () => {
    const cell = column.layout.ice + 3 * column.layout.classes + 4
    const { place } = failureOf((_time_s, _y, dy) => {
      dy.fill(0)
      dy[cell] = Number.NaN
    })
    expect(place.quantity).toBe('ice of class 5')
    expect(place.altitude_m).toBe(column.grid.centres_m[3])
  })

  it('stops when the steps between two outputs are used up', () => {
    const { message, place } = failureOf((time_s, _y, dy) => {
      dy.fill(0)
      dy[column.layout.vapour] = 1e16 * Math.cos(time_s)
    }, 20)
    expect(message).toMatch(/^the solver used up its steps between outputs \(.*20\)$/)
    expect(place.time_s).toBeGreaterThan(0)
  })

  it('turns an exception of the right-hand side into a failure of the model', () => {
    const { message } = failureOf(() => {
      throw new Error('no such air')
    })
    expect(message).toBe('the right-hand side failed: no such air')
  })

  it('carries the step size over an interval too short to tell one', () => {
    const integrator = makeIntegrator(column, { enter() {}, evaluate: (_t, _y, dy) => dy.fill(0) })
    const steps = integrator.over(
      { from_s: 0, to_s: 1e-3 },
      { ...initialSnapshot(column), stepSize_s: 90 },
    )
    let step = steps.next()
    while (!step.done) step = steps.next()
    expect(step.value.stepSize_s).toBe(90)
  })
})
