import { facePoint } from '../../grid.ts'
import { waterDiffusivity } from '../../processes/waterDiffusivity.ts'
import { isShut, type Situation } from './situation.ts'
import { addFluxes, listTracers, mixingRatios, type Tracer } from './tracers.ts'

/**
 * Eddy and molecular diffusion:
 *   dN/dt = +d/dz [n0 (K + D)/(1 + Z)^2 dq/dz]      vapour
 *   dN/dt = +d/dz [n0 K/(1 + Z)^2 dq/dz]            nuclei, ice and cores
 * Ice and cores do not diffuse through the ends of the column.
 */
export function diffusion(now: Situation, dy: Float64Array): void {
  const { grid, scenario } = now.column
  if (!scenario.processes.diffusion) return
  for (const tracer of listTracers(now.column)) {
    const q = mixingRatios(now, tracer)
    const flux = grid.faces_m.map((_, face) =>
      isShut(now, face)
        ? 0
        : (-exchange(now, tracer, face) * (q[face + 1] - q[face])) / grid.spacing_m,
    )
    addFluxes(now, tracer, flux, dy)
  }
}

/** n0 (K + D)/(1 + Z)^2 at a face, D for vapour only, 1/(m s). */
function exchange({ rest, air }: Situation, { kind }: Tracer, face: number): number {
  const point = facePoint(face)
  const molecular =
    kind === 'vapour' ? waterDiffusivity(air.temperature_K[point], air.pressure_Pa[point]) : 0
  const stretch = 1 + air.stretching[point]
  return (rest.density_per_m3[point] * (air.mixing_m2_per_s[point] + molecular)) / stretch ** 2
}
