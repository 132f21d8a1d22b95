import { centrePoint } from '../../grid.ts'
import type { Situation } from './situation.ts'

/** Loss of vapour to photolysis, dN/dt = -N/lifetime; nothing is lost from a closed column. */
export function photolysis({ column, air, y }: Situation, dy: Float64Array): void {
  const { grid, layout, scenario } = column
  if (scenario.processes.closed) return
  for (let level = 0; level < grid.levels; level++) {
    const loss = y[layout.vapour + level] * air.photolysis_per_s[centrePoint(level)]
    dy[layout.vapour + level] -= loss
    dy[layout.waterAccount.photolysis] -= loss * grid.spacing_m
  }
}
