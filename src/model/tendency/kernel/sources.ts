import { centrePoint } from '../../grid.ts'
import type { Column } from '../../state/column.ts'
import type { AirCoefficients } from '../airCoefficients.ts'

/** Loss of vapour to photolysis: dN/dt = -N/lifetime. */
export function addPhotolysis(
  { layout, grid }: Column,
  { level }: AirCoefficients,
  y: ArrayLike<number>,
  dy: number[],
): void {
  let lost = 0
  for (let i = 0; i < layout.levels; i++) {
    const loss = y[layout.vapour + i] * level.photolysis[i]
    dy[layout.vapour + i] -= loss
    lost += loss
  }
  dy[layout.waterAccount.photolysis] -= lost * grid.spacing_m
}

/** Slow injections of water and nuclei by ramped perturbations, while they rise. */
export function addInjection(
  { layout, grid, scenario }: Column,
  { level, injection }: AirCoefficients,
  y: ArrayLike<number>,
  dy: number[],
): void {
  if (!injection.active) return
  for (let i = 0; i < layout.levels; i++) {
    const point = centrePoint(i)
    const density = level.density[i]
    const cell = layout.vapour + i
    const water =
      injection.waterAdded_per_s[point] * density + injection.waterGain_per_s[point] * y[cell]
    dy[cell] += water
    dy[layout.waterAccount.injection] += water * grid.spacing_m
    scenario.background.nucleusClasses.forEach(({ share }, j) => {
      const place = layout.nuclei + i * layout.nucleusClasses + j
      const nuclei =
        injection.nucleiAdded_per_s[point] * density * share +
        injection.nucleiGain_per_s[point] * y[place]
      dy[place] += nuclei
      dy[layout.nucleusAccount.injection + j] += nuclei * grid.spacing_m
    })
  }
}
