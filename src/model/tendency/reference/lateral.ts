import { type Situation, windFlux } from './situation.ts'
import { listTracers, mixingRatios } from './tracers.ts'

/**
 * Air that the mean wind loses or gains sideways, with its own mixing ratio:
 *   dN/dt = +q d(n0 w)/dz      all tracers
 * so that a constant mixing ratio stays constant in any wind.
 */
export function lateral(now: Situation, dy: Float64Array): void {
  const { grid, scenario } = now.column
  if (scenario.processes.closed) return
  const wind = grid.faces_m.map((_, face) => windFlux(now, face))
  for (const tracer of listTracers(now.column)) {
    const q = mixingRatios(now, tracer)
    for (let i = 0; i < grid.levels; i++) {
      const gain = (q[i + 1] * (wind[i + 1] - wind[i])) / grid.spacing_m
      dy[tracer.start + i * tracer.stride] += gain
      dy[tracer.accounts.lateral] += gain * grid.spacing_m * tracer.content
    }
  }
}
