/**
 * The right-hand side of the whole column: what the integrator calls. `makeTendency` gives the fast form;
 * `referenceTendency` is the same sum written plainly, against which the fast form is tested.
 */
import type { AirBasis, Interval } from '../atmosphere/atmosphere.ts'
import type { Column } from '../state/column.ts'
import type { StateLayout } from '../state/layout.ts'
import {
  type AirCoefficients,
  makeAirCoefficients,
  readAirCoefficients,
} from './airCoefficients.ts'
import { transportCores } from './kernel/coreTransport.ts'
import { exchangeIce, handOver } from './kernel/iceExchange.ts'
import { transportIce } from './kernel/iceTransport.ts'
import { makeKelvinTable } from './kernel/kelvinTable.ts'
import { makeNucleationKernel } from './kernel/nucleation.ts'
import { addInjection, addPhotolysis } from './kernel/sources.ts'
import { type Inflow, transportTracer } from './kernel/tracerTransport.ts'
import { makeIceWorkspace, readIce } from './kernel/workspace.ts'

export interface Tendency {
  /** To be called before evaluating inside an interval. */
  enter(basis: AirBasis, interval: Interval): void
  /** Writes dy/dt at (time, y) into dy; never writes to y. */
  evaluate(time_s: number, y: ArrayLike<number>, dy: number[]): void
}

/** dy/dt = transport of vapour, nuclei, ice and cores + growth + nucleation - photolysis + injection. */
export function makeTendency(column: Column): Tendency {
  const { layout, atmosphere, sizes, scenario, grid } = column
  const coefficients = makeAirCoefficients(column)
  const work = makeIceWorkspace(column)
  const kelvin = makeKelvinTable(sizes.edges_m)
  const nucleation = makeNucleationKernel(column)
  const transport = makeGasTransport(column, coefficients)
  const ceiling = 1 / scenario.numerics.sublimationCeiling_s
  const inflow: Inflow = { bottom: 0, top: 0, lateral: 0 }
  let basis: AirBasis
  let interval: Interval

  const readAir = (time_s: number) =>
    readAirCoefficients(coefficients, column, basis, atmosphere.read(basis, time_s, interval))

  const moveIce = (y: ArrayLike<number>, dy: number[]) => {
    readIce(work, y, layout, coefficients.level.inverseDensity)
    transportIce(coefficients, work, grid.spacing_m, inflow)
    bookWater(dy, layout, inflow, 'fallout')
    for (let j = 0; j < layout.nucleusClasses; j++) {
      const state = { y, dy, start: layout.cores, spacing_m: grid.spacing_m, member: j }
      transportCores(coefficients, work, state, inflow)
      bookNuclei(dy, layout, inflow, j, 'fallout')
    }
  }

  return {
    enter(nextBasis, nextInterval) {
      basis = nextBasis
      interval = nextInterval
      if (atmosphere.steady) readAir(interval.from_s)
    },
    evaluate(time_s, y, dy) {
      if (!atmosphere.steady) readAir(time_s)
      dy.fill(0, 0, layout.ice)
      dy.fill(0, layout.cores)
      transport.vapour(y, dy)
      transport.nuclei(y, dy)
      moveIce(y, dy)
      if (scenario.processes.growth) {
        exchangeIce(coefficients, work, kelvin, { y, dy, start: layout, ceiling })
      } else {
        for (let i = 0; i < layout.levels; i++) handOver(work, { dy, start: layout }, i, 0)
      }
      nucleation.add(coefficients, y, dy)
      addPhotolysis(column, coefficients, y, dy)
      addInjection(column, coefficients, y, dy)
    },
  }
}

function makeGasTransport({ layout, grid, scenario }: Column, coefficients: AirCoefficients) {
  const { nucleusClasses } = scenario.background
  const { outside, face } = coefficients
  const q = new Float64Array(layout.levels + 2)
  const inflow: Inflow = { bottom: 0, top: 0, lateral: 0 }
  return {
    vapour(y: ArrayLike<number>, dy: number[]): void {
      const tracer = {
        start: layout.vapour,
        stride: 1,
        below: outside.waterBelow,
        above: outside.waterAbove,
        exchange: face.vapour,
      }
      transportTracer(coefficients, tracer, { y, dy, q, spacing_m: grid.spacing_m }, inflow)
      bookWater(dy, layout, inflow, 'bottom')
    },
    nuclei(y: ArrayLike<number>, dy: number[]): void {
      nucleusClasses.forEach(({ share }, j) => {
        const tracer = {
          start: layout.nuclei + j,
          stride: layout.nucleusClasses,
          below: outside.nucleiBelow * share,
          above: outside.nucleiAbove * share,
          exchange: face.eddy,
        }
        transportTracer(coefficients, tracer, { y, dy, q, spacing_m: grid.spacing_m }, inflow)
        bookNuclei(dy, layout, inflow, j, 'bottom')
      })
    },
  }
}

type Floor = 'bottom' | 'fallout'

function bookWater(
  dy: number[],
  { waterAccount }: StateLayout,
  inflow: Inflow,
  floor: Floor,
): void {
  dy[waterAccount[floor]] += inflow.bottom
  dy[waterAccount.top] += inflow.top
  dy[waterAccount.lateral] += inflow.lateral
}

function bookNuclei(
  dy: number[],
  { nucleusAccount }: StateLayout,
  inflow: Inflow,
  member: number,
  floor: Floor,
): void {
  dy[nucleusAccount[floor] + member] += inflow.bottom
  dy[nucleusAccount.top + member] += inflow.top
  dy[nucleusAccount.lateral + member] += inflow.lateral
}
