import { type AirBasis, type Interval, SAME_TIME } from './atmosphere/atmosphere.ts'
import { isNeutral } from './atmosphere/perturbation.ts'
import { makeIntegrator, type SolverStatistics } from './integrate/integrate.ts'
import type { Perturbation } from './scenario/types.ts'
import type { Column } from './state/column.ts'
import { stateAtStart } from './state/initialState.ts'
import { inject, rebase } from './state/jumps.ts'
import { makeTendency } from './tendency/tendency.ts'

export type { SolverStatistics } from './integrate/integrate.ts'
export { type Column, prepareColumn } from './state/column.ts'

/** All that is needed to go on exactly from here. */
export interface Snapshot {
  time_s: number
  y: Float64Array
  /** Step size of the solver. */
  stepSize_s: number
  /** Time of the balance to which the air density belongs. */
  basisTime_s: number
}

export type SimulationEvent =
  | { kind: 'step'; time_s: number; y: readonly number[] }
  | { kind: 'state'; snapshot: Snapshot }

/** First step tried when nothing is known, s. */
const FIRST_STEP = 1

/**
 * Runs the column: the initial state, then for every interval between break points
 *   1. re-base the air where a changing background asks for it, and inject what steps and pulses bring,
 *   2. integrate the sum of all tendencies over the interval,
 *   3. hand out the state if the interval ends at an output time.
 * Yields a 'step' after every accepted solver step (a place to look, stop or breathe) and a 'state' per output time.
 *
 * @param from continue from here instead of from the initial state
 * @throws ModelError when the solution fails
 */
export function* simulate(
  column: Column,
  from: Snapshot = initialSnapshot(column),
): Generator<SimulationEvent, SolverStatistics> {
  const tendency = makeTendency(column)
  const integrator = makeIntegrator(column, tendency)
  let snapshot = from
  let basis = column.atmosphere.basis(from.basisTime_s)
  yield { kind: 'state', snapshot }
  for (const interval of intervals(column, from.time_s)) {
    ;({ snapshot, basis } = beginInterval(column, snapshot, basis, interval))
    tendency.enter(basis, interval)
    const steps = integrator.over(interval, snapshot)
    let step = steps.next()
    for (; !step.done; step = steps.next()) yield { kind: 'step', ...step.value }
    snapshot = { ...step.value, time_s: interval.to_s, basisTime_s: basis.time_s }
    if (interval.output) yield { kind: 'state', snapshot }
  }
  return integrator.statistics
}

/** The state at time zero: background air, initial ice, and what perturbations bring that hold from the start. */
export function initialSnapshot(column: Column): Snapshot {
  return { time_s: 0, y: stateAtStart(column), stepSize_s: FIRST_STEP, basisTime_s: 0 }
}

export interface OutputInterval extends Interval {
  /** Whether its end is an output time. */
  output: boolean
}

/** Output times of a run: every output interval, and the end. */
export function outputTimes({ scenario }: Column): number[] {
  const { duration_s, outputInterval_s } = scenario
  const count = Math.ceil(duration_s / outputInterval_s - 1e-9)
  return Array.from({ length: count }, (_, i) => Math.min((i + 1) * outputInterval_s, duration_s))
}

/** The intervals between break points and output times from a time on. */
export function intervals(column: Column, from_s: number): OutputInterval[] {
  const outputs = outputTimes(column)
  const breaks = column.atmosphere.breakPoints_s.filter(
    (time) => !outputs.some((output) => isSame(output, time)),
  )
  const edges = [...outputs, ...breaks].filter((time) => time > from_s).sort((a, b) => a - b)
  const isOutput = new Set(outputs)
  return edges.map((to_s, i) => ({
    from_s: i === 0 ? from_s : edges[i - 1],
    to_s,
    output: isOutput.has(to_s),
  }))
}

function isSame(time_s: number, other_s: number): boolean {
  return Math.abs(time_s - other_s) <= SAME_TIME
}

function beginInterval(
  column: Column,
  snapshot: Snapshot,
  basis: AirBasis,
  { from_s }: Interval,
): { snapshot: Snapshot; basis: AirBasis } {
  const { atmosphere, scenario } = column
  const arriving = scenario.perturbations.filter((change) => arrivesAt(change, from_s))
  const rebasing = atmosphere.rebaseTimes_s.some((time) => isSame(time, from_s))
  if (arriving.length === 0 && !rebasing) return { snapshot, basis }
  const y = snapshot.y.slice()
  const next = rebasing ? atmosphere.basis(from_s) : basis
  if (rebasing) rebase(y, basis, next, column)
  for (const change of arriving) {
    inject(y, change, scenario.background.nucleusClasses, { ...column, rest: next.rest })
  }
  return { snapshot: { ...snapshot, y }, basis: next }
}

/** Whether a perturbation changes vapour or nuclei of the state at this instant; what holds from the start is in it. */
function arrivesAt(change: Perturbation, time_s: number): boolean {
  const { quantity, time } = change
  return (
    (quantity === 'water' || quantity === 'nuclei') &&
    (time.shape === 'step' || time.shape === 'pulse') &&
    isSame(time.start_s, time_s) &&
    time_s > 0 &&
    !isNeutral(change)
  )
}
