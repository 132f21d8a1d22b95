import type { AirState } from '../../atmosphere/airState.ts'
import type { RestingAir } from '../../atmosphere/restingAir.ts'
import { centrePoint, facePoint } from '../../grid.ts'
import type { Column } from '../../state/column.ts'

/** What the terms of the reference read: the column, its air at rest and now, and the state. */
export interface Situation {
  column: Column
  rest: RestingAir
  air: AirState
  y: Float64Array
}

/** A term adds its part of dy/dt, sign included. */
export type Term = (now: Situation, dy: Float64Array) => void

/** Whether a face is the top or bottom of a closed column. */
export function isShut({ column }: Situation, face: number): boolean {
  return column.scenario.processes.closed && (face === 0 || face === column.grid.levels)
}

/** Mean wind as a flux of air through a face, n0 w, 1/(m2 s); positive upward. */
export function windFlux(now: Situation, face: number): number {
  if (!now.column.scenario.processes.wind || isShut(now, face)) return 0
  const point = facePoint(face)
  return now.rest.density_per_m3[point] * now.air.wind_m_per_s[point]
}

/** Partial pressure of the vapour of a level, q p, Pa. */
export function vapourPressure({ column, rest, air, y }: Situation, level: number): number {
  const point = centrePoint(level)
  return (y[column.layout.vapour + level] / rest.density_per_m3[point]) * air.pressure_Pa[point]
}
