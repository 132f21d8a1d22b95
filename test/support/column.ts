import { resolve } from '../../src/model/scenario/resolve.ts'
import type { Profile, Scenario } from '../../src/model/scenario/types.ts'
import { type Column, prepareColumn, type Snapshot, simulate } from '../../src/model/simulate.ts'

/** A profile section that holds one value at all altitudes. */
export function uniform(key: string, value: number): object {
  return { knots: [0, 150].map((altitude_km) => ({ altitude_km, [key]: value })) }
}

/** All transport and exchange switched off. */
export const NO_PROCESSES = { growth: false, sedimentation: false, diffusion: false, wind: false }

/**
 * A column from a scenario document, every key of which may be left out.
 *
 * @param change what no document can say, such as a profile given on the grid itself
 */
export function columnOf(
  document: object,
  change: (scenario: Scenario) => Scenario = (scenario) => scenario,
): Column {
  return prepareColumn(change(resolve(document).scenario))
}

/** A profile that holds the exact values of a function on the points of a grid. */
export function sampled(points_m: Float64Array, value: (altitude_m: number) => number): Profile {
  return {
    altitudes_m: Array.from(points_m),
    times_s: [0],
    values: [Array.from(points_m, value)],
    logarithmic: false,
  }
}

/** The states of a run at its start and its output times. */
export function statesOf(column: Column, from?: Snapshot): Snapshot[] {
  const states: Snapshot[] = []
  for (const event of simulate(column, from)) {
    if (event.kind === 'state') states.push(event.snapshot)
  }
  return states
}

/** The state at the end of a run. */
export function finalState(column: Column, from?: Snapshot): Snapshot {
  const states = statesOf(column, from)
  return states[states.length - 1]
}
