import { halfVanLeerSlope } from '../../numerics/halfVanLeerSlope.ts'
import type { AirCoefficients } from '../airCoefficients.ts'
import type { KelvinTable } from './kelvinTable.ts'
import type { IceWorkspace } from './workspace.ts'

interface ExchangeState {
  y: ArrayLike<number>
  dy: number[]
  start: { vapour: number; nuclei: number; ice: number; cores: number }
  /** Fastest passage of one class by sublimation, 1/s. */
  ceiling: number
}

/**
 * Writes dy of the ice, growth and sublimation added to the gain by transport, and adds their share to vapour, nuclei
 * and cores: particles move between classes with dr/dt at the class edges over the spacing of the classes, limited
 * upwind; the vapour pays or gets the water of the difference. Sublimation passes at most one class per ceiling time;
 * the face value fades to first order between once and twice the ceiling, which keeps the stiffness down. Particles
 * that leave the smallest class downward return their water and their cores.
 */
export function exchangeIce(
  { level }: AirCoefficients,
  work: IceWorkspace,
  kelvin: KelvinTable,
  state: ExchangeState,
): void {
  const { y, dy, start } = state
  for (let i = 0; i < work.levels; i++) {
    if (work.occupied[i] === 0) {
      handOver(work, state, i, 0)
      continue
    }
    const vapourPressure = y[start.vapour + i] * level.pressurePerDensity[i]
    const row = kelvin.rowOf(level.kelvinRadius[i])
    const rates = {
      supply: level.growth[i] * vapourPressure,
      loss: level.growth[i] * level.growthPressure[i],
      row,
      remainder: level.kelvinRadius[i] - kelvin.exactRadius(row),
      density: level.density[i],
    }
    const sublimated = leaveSmallest(rates, work, kelvin, state.ceiling, i)
    const taken = passEdges(rates, work, kelvin, state, i)
    dy[start.vapour + i] += sublimated * work.molecules[0] - taken
    if (sublimated === 0) continue
    const place = i * work.nucleusClasses
    for (let j = 0; j < work.nucleusClasses; j++) {
      const freed = sublimated * work.mix[place + j]
      dy[start.cores + place + j] -= freed
      dy[start.nuclei + place + j] += freed
    }
  }
}

/** Writes dy of the ice of one level from its gain by transport alone, from a class on. */
export function handOver(
  { classes, gain, touched }: IceWorkspace,
  { dy, start }: Pick<ExchangeState, 'dy' | 'start'>,
  i: number,
  fromClass: number,
): void {
  const first = i * classes
  const end = Math.max(touched[i], fromClass)
  for (let k = fromClass; k < end; k++) dy[start.ice + first + k] = gain[first + k]
  for (let k = end; k < classes; k++) dy[start.ice + first + k] = 0
}

/** dr/dt of a level at edge k: supply - loss exp(a/r_k), m/s. */
interface LevelRates {
  supply: number
  loss: number
  row: number
  remainder: number
  density: number
}

/** Complete sublimation, taken out of the gain of the smallest class; particles per volume and second. */
function leaveSmallest(
  { supply, loss, row, remainder, density }: LevelRates,
  { classes, q, gain, inverseEdges, inverseEdgeSpacing }: IceWorkspace,
  kelvin: KelvinTable,
  ceiling: number,
  i: number,
): number {
  const d = remainder * inverseEdges[0]
  const factor = kelvin.factors[row] * (1 + d * (1 + 0.5 * d))
  const rate = (loss * factor - supply) * inverseEdgeSpacing[0]
  if (rate <= 0) return 0
  const sublimated = Math.min(rate, ceiling) * q[i * classes] * density
  gain[i * classes] -= sublimated
  return sublimated
}

/** Moves particles through all inner edges of a level; returns the water taken up, molecules/(m3 s). */
function passEdges(
  { supply, loss, row, remainder, density }: LevelRates,
  work: IceWorkspace,
  { factors }: KelvinTable,
  state: ExchangeState,
  i: number,
): number {
  const { classes, q, gain, touched, occupied } = work
  const { inverseEdges, inverseEdgeSpacing, moleculeSteps } = work
  const { dy, start, ceiling } = state
  const first = i * classes
  const place = start.ice + first
  const last = Math.min(occupied[i], classes - 1)
  let lower = q[first]
  let lowerHalfSlope = 0
  let flux = 0
  let water = 0
  for (let k = 1; k <= last; k++) {
    const cell = q[first + k]
    const next = k < classes - 1 ? q[first + k + 1] : cell
    const halfSlope = halfVanLeerSlope(cell - lower, next - cell)
    const d = remainder * inverseEdges[k]
    const factor = factors[row + k] * (1 + d * (1 + 0.5 * d))
    const rate = (supply - loss * factor) * inverseEdgeSpacing[k]
    const flow =
      rate > 0
        ? density * rate * (lower + lowerHalfSlope)
        : density * cappedLoss(rate, ceiling, cell, halfSlope)
    dy[place + k - 1] = gain[first + k - 1] + (flux - flow)
    water += flow * moleculeSteps[k]
    flux = flow
    lower = cell
    lowerHalfSlope = halfSlope
  }
  dy[place + last] = (last < touched[i] ? gain[first + last] : 0) + flux
  handOver(work, state, i, last + 1)
  return water
}

/** Rate times face value of a shrinking cell, with the ceiling on the rate; slope faded out from one to two ceilings. */
function cappedLoss(rate: number, ceiling: number, cell: number, halfSlope: number): number {
  if (rate >= -ceiling) return rate * (cell - halfSlope)
  return -ceiling * (cell - Math.max(0, 2 + rate / ceiling) * halfSlope)
}
