/**
 * What the fast right-hand side needs of the air for every class of ice: rows of levels or faces, the classes of one
 * row side by side.
 */
import type { AirState } from '../atmosphere/airState.ts'
import type { AirBasis } from '../atmosphere/atmosphere.ts'
import { facePoint } from '../grid.ts'
import { fallSpeedSeries } from '../processes/fallSpeedSeries.ts'
import type { Column } from '../state/column.ts'
import type { FaceCoefficients, LevelCoefficients } from './airCoefficients.ts'
import type { KelvinTable } from './kernel/kelvinTable.ts'

export interface IceCoefficients {
  /** Per face and class, n0 [w - v(r)/(1 + Z)], 1/(m2 s); positive upward. */
  speed: Float64Array
  /** Per level and class edge, rate at which sublimation into a vacuum passes one class, 1/s. */
  loss: Float64Array
}

export function makeIceCoefficients({ grid, sizes }: Column): IceCoefficients {
  return {
    speed: new Float64Array((grid.levels + 1) * sizes.count),
    loss: new Float64Array(grid.levels * (sizes.count + 1)),
  }
}

/** n0 w - n0 v(r)/(1 + Z) for every face and class; nothing passes the ends of a closed column. */
export function readSpeeds(
  speed: Float64Array,
  { wind }: FaceCoefficients,
  column: Column,
  { basis, air }: { basis: AirBasis; air: AirState },
): void {
  const { scenario, grid, sizes } = column
  const { density, dragDelta, slip } = scenario.ice
  const { radii_m, count } = sizes
  const { sedimentation, closed } = scenario.processes
  for (let f = 0; f <= grid.levels; f++) {
    const point = facePoint(f)
    const place = f * count
    const shut = closed && (f === 0 || f === grid.levels)
    if (!sedimentation || shut) {
      speed.fill(wind[f], place, place + count)
      continue
    }
    const temperature_K = air.temperature_K[point]
    const pressure_Pa = air.pressure_Pa[point]
    const gravity = basis.rest.gravity_m_per_s2[point]
    const fall = fallSpeedSeries({ temperature_K, pressure_Pa, gravity, density, dragDelta, slip })
    const factor = basis.rest.density_per_m3[point] / (1 + air.stretching[point])
    const linear = factor * fall.linear
    const quadratic = factor * fall.quadratic
    const cubic = factor * fall.cubic
    const lift = wind[f]
    for (let k = 0; k < count; k++) {
      const r = radii_m[k]
      speed[place + k] = lift - r * (linear + r * (quadratic + r * cubic))
    }
  }
}

/** (dr/dt)/(edge spacing) without vapour, sign dropped: growth coefficient times p_s exp(r_K/r) over the spacing. */
export function readLosses(
  loss: Float64Array,
  { growth, growthPressure, kelvinRadius }: LevelCoefficients,
  kelvin: KelvinTable,
): void {
  const { inverseEdges, inverseEdgeSpacing, factors } = kelvin
  const width = inverseEdges.length
  for (let i = 0; i < growth.length; i++) {
    const row = kelvin.rowOf(kelvinRadius[i])
    const remainder = kelvinRadius[i] - kelvin.exactRadius(row)
    const plane = growth[i] * growthPressure[i]
    const place = i * width
    for (let k = 0; k < width; k++) {
      const d = remainder * inverseEdges[k]
      const factor = factors[row + k] * (1 + d * (1 + d * (1 / 2 + d * (1 / 6))))
      loss[place + k] = plane * factor * inverseEdgeSpacing[k]
    }
  }
}
