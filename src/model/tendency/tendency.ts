/**
 * The right-hand side of the whole column: what the integrator calls. `makeTendency` gives the fast form; `reference`
 * holds the same sum written plainly, against which the fast form is tested.
 *
 * Every part of the fast form is a closure over the arrays it works on, made once per column: the engine then compiles
 * the places of the arrays into the inner loops, which halves their time. It does so for the first column of a thread
 * only; further ones run correctly but slower.
 */
import type { AirBasis, Interval } from '../atmosphere/atmosphere.ts'
import type { Column } from '../state/column.ts'
import type { StateLayout } from '../state/layout.ts'
import type { AirCoefficients } from './airCoefficients.ts'
import { transportCores } from './kernel/coreTransport.ts'
import { makeIceExchange } from './kernel/iceExchange.ts'
import { makeIceTransport } from './kernel/iceTransport.ts'
import { makeKelvinTable } from './kernel/kelvinTable.ts'
import { makeNucleation } from './kernel/nucleation.ts'
import { addInjection, addPhotolysis } from './kernel/sources.ts'
import { type Inflow, transportTracer } from './kernel/tracerTransport.ts'
import {
  makeCoreMixReader,
  makeGainWriter,
  makeIceReader,
  makeIceWorkspace,
} from './kernel/workspace.ts'
import { makeRecentAir } from './recentAir.ts'

export interface Tendency {
  /** To be called before evaluating inside an interval. */
  enter(basis: AirBasis, interval: Interval): void
  /** Writes dy/dt at (time, y) into dy; never writes to y. */
  evaluate(time_s: number, y: ArrayLike<number>, dy: number[]): void
}

/** dy/dt = transport of vapour, nuclei, ice and cores + growth + nucleation - photolysis + injection. */
export function makeTendency(column: Column): Tendency {
  const { layout } = column
  const recent = makeRecentAir(column, makeKelvinTable(column.sizes))
  const gas = makeGasTransport(column)
  const ice = makeIceMotion(column)
  const nucleate = makeNucleation(column)
  return {
    enter: recent.enter,
    evaluate(time_s, y, dy) {
      const air = recent.at(time_s)
      dy.fill(0, 0, layout.ice)
      dy.fill(0, layout.cores)
      ice(air, y, dy)
      gas.vapour(air, y, dy)
      gas.nuclei(air, y, dy)
      nucleate(air, y, dy)
      addPhotolysis(column, air, y, dy)
      addInjection(column, air, y, dy)
    },
  }
}

/** Writes dy of the ice and adds to the rest: transport of ice and cores, growth and sublimation. */
function makeIceMotion(column: Column) {
  const { layout, grid, scenario } = column
  const work = makeIceWorkspace(column)
  const readIce = makeIceReader(work, layout)
  const readCoreMix = makeCoreMixReader(work, layout)
  const transport = makeIceTransport(work, grid.spacing_m)
  const exchange = makeIceExchange(column, work)
  const writeGain = makeGainWriter(work, layout)
  const inflow: Inflow = { bottom: 0, top: 0, lateral: 0 }
  return (air: AirCoefficients, y: ArrayLike<number>, dy: number[]) => {
    readIce(y, air.level.inverseDensity)
    readCoreMix(y)
    transport(air, inflow)
    bookWater(dy, layout, inflow, 'fallout')
    if (scenario.processes.growth) exchange(air, y, dy)
    writeGain(dy)
    for (let member = 0; member < layout.nucleusClasses; member++) {
      const state = { y, dy, start: layout.cores, spacing_m: grid.spacing_m, member }
      transportCores(air, work, state, inflow)
      bookNuclei(dy, layout, inflow, member, 'fallout')
    }
  }
}

function makeGasTransport({ layout, grid, scenario }: Column) {
  const { nucleusClasses } = scenario.background
  const q = new Float64Array(layout.levels + 2)
  const inflow: Inflow = { bottom: 0, top: 0, lateral: 0 }
  return {
    vapour(air: AirCoefficients, y: ArrayLike<number>, dy: number[]): void {
      const tracer = {
        start: layout.vapour,
        stride: 1,
        below: air.outside.waterBelow,
        above: air.outside.waterAbove,
        exchange: air.face.vapour,
      }
      transportTracer(air, tracer, { y, dy, q, spacing_m: grid.spacing_m }, inflow)
      bookWater(dy, layout, inflow, 'bottom')
    },
    nuclei(air: AirCoefficients, y: ArrayLike<number>, dy: number[]): void {
      nucleusClasses.forEach(({ share }, j) => {
        const tracer = {
          start: layout.nuclei + j,
          stride: layout.nucleusClasses,
          below: air.outside.nucleiBelow * share,
          above: air.outside.nucleiAbove * share,
          exchange: air.face.eddy,
        }
        transportTracer(air, tracer, { y, dy, q, spacing_m: grid.spacing_m }, inflow)
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
