import { halfVanLeerSlope } from '../../numerics/halfVanLeerSlope.ts'
import type { Column } from '../../state/column.ts'
import type { AirCoefficients } from '../airCoefficients.ts'
import type { IceWorkspace } from './workspace.ts'

/**
 * Adds growth and sublimation to the gain of the ice and to dy of vapour, nuclei and cores: particles move between
 * classes with dr/dt at the class edges over the spacing of the classes, limited upwind; the vapour pays or gets the
 * water of the difference. Sublimation passes at most one class per ceiling time; the face value fades to first order
 * between once and twice the ceiling, which keeps the stiffness down. Particles that leave the smallest class downward
 * return their water and their cores.
 */
export function makeIceExchange({ layout, scenario }: Column, work: IceWorkspace) {
  const ceiling = 1 / scenario.numerics.sublimationCeiling_s
  const passEdges = makeEdgePassing(work, ceiling)
  const leaveSmallest = makeCompleteSublimation(work, ceiling)
  const { levels, occupied, molecules, mix } = work
  const { nucleusClasses, vapour, nuclei, cores } = layout
  return (air: AirCoefficients, y: ArrayLike<number>, dy: number[]): void => {
    const { growth, pressurePerDensity } = air.level
    for (let i = 0; i < levels; i++) {
      if (occupied[i] === 0) continue
      const supply = growth[i] * y[vapour + i] * pressurePerDensity[i]
      const taken = passEdges(air, supply, i)
      const sublimated = leaveSmallest(air, supply, i)
      dy[vapour + i] += sublimated * molecules[0] - taken
      if (sublimated === 0) continue
      for (let place = i * nucleusClasses; place < (i + 1) * nucleusClasses; place++) {
        const freed = sublimated * mix[place]
        dy[cores + place] -= freed
        dy[nuclei + place] += freed
      }
    }
  }
}

/** Moves particles through all inner edges of a level; the result takes up so much water, molecules/(m3 s). */
function makeEdgePassing(work: IceWorkspace, ceiling: number) {
  const { classes, rowWidth, q, gain, occupied, inverseEdgeSpacing, moleculeSteps } = work
  /** @param supply dr/dt that the vapour alone would give, m/s */
  return ({ level, ice }: AirCoefficients, supply: number, i: number): number => {
    const { loss } = ice
    const density = level.density[i]
    const row = i * rowWidth
    const place = i * classes
    const last = Math.min(occupied[i], classes - 1)
    let lower = q[row]
    let cell = q[row + 1]
    let lowerHalfSlope = 0
    let flux = 0
    let water = 0
    for (let k = 1; k <= last; k++) {
      const upper = q[row + k + 1]
      const halfSlope = halfVanLeerSlope(cell - lower, upper - cell)
      const rate = supply * inverseEdgeSpacing[k] - loss[row + k]
      const flow =
        rate > 0 ? rate * (lower + lowerHalfSlope) : cappedLoss(rate, ceiling, cell, halfSlope)
      gain[place + k - 1] += density * (flux - flow)
      water += flow * moleculeSteps[k]
      flux = flow
      lower = cell
      lowerHalfSlope = halfSlope
      cell = upper
    }
    gain[place + last] += density * flux
    return density * water
  }
}

/** Rate times face value of a shrinking cell, with the ceiling on the rate; slope faded out from one to two ceilings. */
function cappedLoss(rate: number, ceiling: number, cell: number, halfSlope: number): number {
  if (rate >= -ceiling) return rate * (cell - halfSlope)
  return -ceiling * (cell - Math.max(0, 2 + rate / ceiling) * halfSlope)
}

/** Takes what shrinks out of the smallest class from its gain; returns it, particles/(m3 s). */
function makeCompleteSublimation(work: IceWorkspace, ceiling: number) {
  const { classes, rowWidth, q, gain, inverseEdgeSpacing } = work
  return ({ level, ice }: AirCoefficients, supply: number, i: number): number => {
    const row = i * rowWidth
    const rate = ice.loss[row] - supply * inverseEdgeSpacing[0]
    if (rate <= 0) return 0
    const sublimated = Math.min(rate, ceiling) * q[row] * level.density[i]
    gain[i * classes] -= sublimated
    return sublimated
  }
}
