import type { AirState } from '../atmosphere/airState.ts'
import type { AirBasis, Atmosphere } from '../atmosphere/atmosphere.ts'
import { centrePoint, type RadiusClasses } from '../grid.ts'
import type { Scenario } from '../scenario/types.ts'
import type { ColumnAxes } from './axes.ts'
import { type ColumnTotals, columnTotals } from './columnTotals.ts'

interface PreparedColumn extends ColumnAxes {
  scenario: Scenario
  atmosphere: Atmosphere
}

/** Background vapour and nuclei, and the ice that the scenario starts with. */
export function initialState(
  scenario: Scenario,
  { grid, sizes, layout }: ColumnAxes,
  { rest }: AirBasis,
  air: AirState,
): Float64Array {
  const y = new Float64Array(layout.length)
  const shares = scenario.background.nucleusClasses.map(({ share }) => share)
  for (let level = 0; level < layout.levels; level++) {
    const point = centrePoint(level)
    const density = rest.density_per_m3[point]
    y[layout.vapour + level] = density * air.water[point]
    shares.forEach((share, j) => {
      y[layout.nuclei + level * layout.nucleusClasses + j] = density * air.nuclei[point] * share
    })
    for (const layer of scenario.initialIce) {
      const height = (grid.centres_m[level] - layer.altitude_m) / layer.sigma_m
      const number = layer.number_per_m3 * Math.exp(-0.5 * height * height)
      logNormalShares(sizes, layer.medianRadius_m, layer.geometricWidth).forEach((share, k) => {
        y[layout.ice + level * layout.classes + k] += number * share
      })
      shares.forEach((share, j) => {
        y[layout.cores + level * layout.nucleusClasses + j] += number * share
      })
    }
  }
  return y
}

/** Shares of the classes in a log-normal size distribution, adding up to one. */
function logNormalShares(
  { radii_m, edges_m }: RadiusClasses,
  medianRadius_m: number,
  geometricWidth: number,
): number[] {
  const width = Math.log(geometricWidth)
  const weights = Array.from(radii_m, (radius, k) => {
    const deviation = Math.log(radius / medianRadius_m) / width
    return (Math.exp(-0.5 * deviation * deviation) * (edges_m[k + 1] - edges_m[k])) / radius
  })
  const sum = weights.reduce((total, weight) => total + weight, 0)
  return weights.map((weight) => weight / sum)
}

/** The state at time zero of a column with its air. */
export function stateAtStart(column: PreparedColumn): Float64Array {
  const { atmosphere, scenario } = column
  const basis = atmosphere.basis(0)
  const air = atmosphere.read(basis, 0, { from_s: 0, to_s: 0 })
  return initialState(scenario, column, basis, air)
}

/** Column totals of the state at time zero. */
export function totalsAtStart(column: PreparedColumn): ColumnTotals {
  return columnTotals(stateAtStart(column), column)
}
