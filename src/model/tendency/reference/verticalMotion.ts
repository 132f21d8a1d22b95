import { facePoint } from '../../grid.ts'
import { halfVanLeerSlope } from '../../numerics/halfVanLeerSlope.ts'
import { fallSpeed } from '../../processes/fallSpeed.ts'
import { isShut, type Situation, windFlux } from './situation.ts'
import { addFluxes, listTracers, mixingRatios, type Tracer } from './tracers.ts'

/**
 * Mean wind and fall:
 *   dN/dt = -d(n0 w q)/dz                           vapour and nuclei
 *   dN/dt = -d([n0 w - n0 v(r)/(1 + Z)] q)/dz       ice of radius r
 * with van Leer-limited upwind face values. Ice enters nowhere. Cores follow in `coreTransport`.
 */
export function verticalMotion(now: Situation, dy: Float64Array): void {
  for (const tracer of listTracers(now.column)) {
    if (tracer.kind === 'cores') continue
    addFluxes(now, tracer, motionFlux(now, tracer), dy)
  }
}

/** Upward flux of vapour, nuclei or ice of one class through every face by wind and fall, 1/(m2 s). */
export function motionFlux(now: Situation, tracer: Tracer): Float64Array {
  return upwindFlux(mixingRatios(now, tracer), airFlux(now, tracer))
}

/** Flux of air that passes the particles through every face, n0 w - n0 v/(1 + Z), 1/(m2 s); for ice outward only. */
function airFlux(now: Situation, { kind, member }: Tracer): Float64Array {
  const { grid, sizes } = now.column
  const wind = grid.faces_m.map((_, face) => windFlux(now, face))
  if (kind !== 'ice') return wind
  const flux = wind.map((upward, face) => upward - fallFlux(now, face, sizes.radii_m[member]))
  flux[0] = Math.min(flux[0], 0)
  flux[grid.levels] = Math.max(flux[grid.levels], 0)
  return flux
}

/** Downward flux of air that a falling particle passes, n0 v(r)/(1 + Z), 1/(m2 s). */
function fallFlux(now: Situation, face: number, radius_m: number): number {
  const { column, rest, air } = now
  const { ice, processes } = column.scenario
  if (!processes.sedimentation || isShut(now, face)) return 0
  const point = facePoint(face)
  const speed = fallSpeed({
    radius_m,
    temperature_K: air.temperature_K[point],
    pressure_Pa: air.pressure_Pa[point],
    gravity: rest.gravity_m_per_s2[point],
    density: ice.density,
    dragDelta: ice.dragDelta,
    slip: ice.slip,
  })
  return (rest.density_per_m3[point] * speed) / (1 + air.stretching[point])
}

/** Flux with the limited face value of the cell that the air comes from; cells outside are flat. */
function upwindFlux(q: Float64Array, airFlux: Float64Array): Float64Array {
  const halfSlope = (cell: number) =>
    cell === 0 || cell === q.length - 1
      ? 0
      : halfVanLeerSlope(q[cell] - q[cell - 1], q[cell + 1] - q[cell])
  return airFlux.map((upward, face) =>
    upward > 0
      ? upward * (q[face] + halfSlope(face))
      : upward * (q[face + 1] - halfSlope(face + 1)),
  )
}
