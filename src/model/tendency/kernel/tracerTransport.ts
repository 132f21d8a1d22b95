import { halfVanLeerSlope } from '../../numerics/halfVanLeerSlope.ts'
import type { AirCoefficients } from '../airCoefficients.ts'

/** One gas or nucleus class: where its cells lie in the state, what holds outside, and how it is mixed. */
export interface Tracer {
  /** Index of the lowest cell, and distance between the cells of neighbouring levels. */
  start: number
  stride: number
  below: number
  above: number
  /** n0 K/(dz (1 + Z)^2) per face. */
  exchange: Float64Array
}

/** What entered the column per unit area and second, 1/(m2 s). */
export interface Inflow {
  bottom: number
  top: number
  lateral: number
}

/**
 * Adds to dy the transport of a tracer by the mean wind and by diffusion:
 *   d(n0 q)/dt = -d(n0 w q)/dz + q d(n0 w)/dz + d/dz [n0 K dq/dz],
 * with van Leer-limited upwind face values. Outside, the background mixing ratio holds half a cell away.
 *
 * @param q scratch for the mixing ratio, levels + 2 long
 */
export function transportTracer(
  { level, face }: AirCoefficients,
  tracer: Tracer,
  state: { y: ArrayLike<number>; dy: number[]; q: Float64Array; spacing_m: number },
  inflow: Inflow,
): void {
  const { start, stride, below, above, exchange } = tracer
  const { y, dy, q, spacing_m } = state
  const levels = level.density.length
  const perSpacing = 1 / spacing_m
  q[0] = below
  q[levels + 1] = above
  for (let i = 0; i < levels; i++) q[i + 1] = y[start + i * stride] * level.inverseDensity[i]
  let halfSlopeBelow = 0
  let fluxBelow = 0
  let lateral = 0
  for (let f = 0; f <= levels; f++) {
    const halfSlopeAbove = f < levels ? halfVanLeerSlope(q[f + 1] - q[f], q[f + 2] - q[f + 1]) : 0
    const wind = face.wind[f]
    const carried = wind > 0 ? wind * (q[f] + halfSlopeBelow) : wind * (q[f + 1] - halfSlopeAbove)
    const flux = carried - exchange[f] * (q[f + 1] - q[f])
    if (f > 0) {
      const converged = q[f] * level.lateral[f - 1]
      dy[start + (f - 1) * stride] += (fluxBelow - flux) * perSpacing + converged
      lateral += converged
    } else {
      inflow.bottom = flux
    }
    fluxBelow = flux
    halfSlopeBelow = halfSlopeAbove
  }
  inflow.top = -fluxBelow
  inflow.lateral = lateral * spacing_m
}
