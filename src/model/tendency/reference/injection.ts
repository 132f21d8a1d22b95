import { centrePoint } from '../../grid.ts'
import type { Situation } from './situation.ts'

/** Water and nuclei brought in by ramped perturbations while they rise: dN/dt = +n0 dq/dt + N d(ln q)/dt. */
export function injection({ column, rest, air, y }: Situation, dy: Float64Array): void {
  const { grid, layout, scenario } = column
  const { waterAdded_per_s, waterGain_per_s, nucleiAdded_per_s, nucleiGain_per_s } = air.injection
  for (let level = 0; level < grid.levels; level++) {
    const point = centrePoint(level)
    const density = rest.density_per_m3[point]
    const cell = layout.vapour + level
    const water = density * waterAdded_per_s[point] + y[cell] * waterGain_per_s[point]
    dy[cell] += water
    dy[layout.waterAccount.injection] += water * grid.spacing_m
    scenario.background.nucleusClasses.forEach(({ share }, j) => {
      const place = layout.nuclei + level * layout.nucleusClasses + j
      const nuclei = density * share * nucleiAdded_per_s[point] + y[place] * nucleiGain_per_s[point]
      dy[place] += nuclei
      dy[layout.nucleusAccount.injection + j] += nuclei * grid.spacing_m
    })
  }
}
