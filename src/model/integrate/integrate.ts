import { Solver } from 'odex'
import type { Interval } from '../atmosphere/atmosphere.ts'
import { ModelError } from '../errors.ts'
import type { Column } from '../state/column.ts'
import { describeIndex, type StateLayout } from '../state/layout.ts'
import type { Tendency } from '../tendency/tendency.ts'
import { makeAbsoluteTolerances, makeRelativeTolerances } from './tolerances.ts'

/** Work done so far by the solver. */
export interface SolverStatistics {
  evaluations: number
  acceptedSteps: number
  /** Largest accepted step, s. */
  largestStep_s: number
}

/** The state where an interval starts or ends, and the step size to go on with. */
export interface SolverPoint {
  y: Float64Array
  stepSize_s: number
}

/** The end of an accepted step and the state there. */
export interface AcceptedStep {
  time_s: number
  y: readonly number[]
}

export interface Integrator {
  /**
   * Integrates over one interval without break points; yields after every accepted step.
   * @throws ModelError on a NaN, on exhausted steps, or on an exception inside the right-hand side
   */
  over(interval: Interval, from: SolverPoint): Generator<AcceptedStep, SolverPoint>
  statistics: SolverStatistics
}

/**
 * The seam to the solver `odex` (extrapolated modified midpoint rule): one solve per interval, so that output times
 * and break points are met exactly, with the step size carried over.
 */
export function makeIntegrator(column: Column, tendency: Tendency): Integrator {
  const { numerics } = column.scenario
  const absoluteTolerance = makeAbsoluteTolerances(column)
  const relativeTolerance = makeRelativeTolerances(column)
  const longestStep_s = longestStep(column)
  const statistics: SolverStatistics = { evaluations: 0, acceptedSteps: 0, largestStep_s: 0 }
  const derivative = (time_s: number, y: number[], dy: number[]) => {
    statistics.evaluations++
    tendency.evaluate(time_s, y, dy)
  }
  return {
    statistics,
    *over({ from_s, to_s }, { y: start, stepSize_s }) {
      const solver = new Solver(derivative, start.length, {
        relativeTolerance,
        absoluteTolerance,
        initialStepSize: stepSize_s,
        maxSteps: numerics.maxStepsPerInterval,
        maxExtrapolationColumns: numerics.extrapolationColumns,
        maxStepSize: longestStep_s,
        // The error estimate notices instability as well; this check would cost a fifth of the solver's time.
        stabilityCheckCount: 0,
        denseOutput: false,
        rawFunction: true,
      })
      let largest = 0
      let time_s = from_s
      let y: number[] = Array.from(start)
      try {
        for (const segment of solver.solutionSegments(from_s, y, to_s)) {
          time_s = segment.x1
          y = segment.y
          largest = Math.max(largest, segment.x1 - segment.x0)
          statistics.acceptedSteps++
          refuseNonFinite(column, y, time_s)
          yield { time_s, y }
        }
      } catch (error) {
        throw asModelError(error, time_s)
      }
      statistics.largestStep_s = Math.max(statistics.largestStep_s, largest)
      // An interval shorter than the step says nothing about the step.
      const isShort = to_s - from_s < stepSize_s
      return { y: Float64Array.from(y), stepSize_s: isShort ? stepSize_s : largest }
    },
  }
}

/**
 * Upwind passage of classes at a rate a is stable in the solver's second column while a h stays below this: the radius
 * of the circle -a h (1 - e^(i phi)) that its stability function keeps below one; computed from that function.
 */
const STABLE_PASSAGE = 2.18

/** A ceiling shorter than this hardly ever holds, and says nothing about the stable step, s. */
const BINDING_CEILING = 10

/**
 * Where ice sublimates at its ceiling, longer steps only get rejected; 0 is no limit. Limits that wander with the
 * state are left to the error estimate.
 */
function longestStep({ scenario }: Column): number {
  const ceiling_s = scenario.numerics.sublimationCeiling_s
  return scenario.processes.growth && ceiling_s >= BINDING_CEILING ? STABLE_PASSAGE * ceiling_s : 0
}

function refuseNonFinite(column: Column, y: readonly number[], time_s: number): void {
  for (let index = 0; index < y.length; index++) {
    if (Number.isFinite(y[index])) continue
    const { quantity, altitude_m } = placeOf(column, column.layout, index)
    throw new ModelError(`${quantity} became ${y[index]}`, { time_s, altitude_m, quantity })
  }
}

function placeOf({ grid }: Column, layout: StateLayout, index: number) {
  const { quantity, level } = describeIndex(layout, index)
  return { quantity, altitude_m: level === null ? null : grid.centres_m[level] }
}

function asModelError(error: unknown, time_s: number): ModelError {
  if (error instanceof ModelError) return error
  const reason = error instanceof Error ? error.message : String(error)
  const message = reason.startsWith('maximum allowed steps')
    ? `the solver used up its steps between outputs (${reason})`
    : `the right-hand side failed: ${reason}`
  return new ModelError(message, { time_s, altitude_m: null, quantity: null })
}
