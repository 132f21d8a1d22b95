import type { AirBasis } from '../atmosphere/atmosphere.ts'
import { altitudeWeight, perturbed } from '../atmosphere/perturbation.ts'
import { ModelError } from '../errors.ts'
import { centrePoint } from '../grid.ts'
import type { NucleusClass, Perturbation } from '../scenario/types.ts'
import type { ColumnAxes } from './axes.ts'

/**
 * Changes vapour or free nuclei at once by a stepped perturbation and books the change.
 * The state is changed in place.
 *
 * @throws ModelError where the perturbation takes away more than there is
 */
export function inject(
  y: Float64Array,
  change: Perturbation,
  nucleusClasses: readonly NucleusClass[],
  { grid, layout, rest }: ColumnAxes & { rest: AirBasis['rest'] },
): void {
  for (let level = 0; level < layout.levels; level++) {
    const weight = altitudeWeight(change.altitude, grid.centres_m[level])
    if (weight === 0) continue
    if (change.quantity === 'water') {
      const density = rest.density_per_m3[centrePoint(level)]
      const index = layout.vapour + level
      const changed = perturbed(change, y[index] / density, weight) * density
      refuseOverdraft(change, changed, y[index], grid.centres_m[level])
      y[layout.waterAccount.injection] += (changed - y[index]) * grid.spacing_m
      y[index] = changed
    } else {
      nucleusClasses.forEach(({ share }, j) => {
        const index = layout.nuclei + level * layout.nucleusClasses + j
        const part = change.mode === 'add' ? { ...change, amount: change.amount * share } : change
        const changed = perturbed(part, y[index], weight)
        refuseOverdraft(change, changed, y[index], grid.centres_m[level])
        y[layout.nucleusAccount.injection + j] += (changed - y[index]) * grid.spacing_m
        y[index] = changed
      })
    }
  }
}

function refuseOverdraft(
  { quantity, time }: Perturbation,
  changed: number,
  present: number,
  altitude_m: number,
): void {
  if (changed >= 0 || present < 0) return
  const time_s = 'start_s' in time ? time.start_s : 0
  throw new ModelError(`a perturbation takes away more ${quantity} than there is`, {
    time_s,
    altitude_m,
    quantity,
  })
}

/** Moves the state to another air density with all mixing ratios held, and books the change of the column. */
export function rebase(
  y: Float64Array,
  from: AirBasis,
  to: AirBasis,
  { grid, sizes, layout }: ColumnAxes,
): void {
  for (let level = 0; level < layout.levels; level++) {
    const point = centrePoint(level)
    const ratio = to.rest.density_per_m3[point] / from.rest.density_per_m3[point]
    const scale = (index: number) => {
      const change = y[index] * (ratio - 1)
      y[index] += change
      return change * grid.spacing_m
    }
    let water = scale(layout.vapour + level)
    for (let k = 0; k < layout.classes; k++) {
      water += scale(layout.ice + level * layout.classes + k) * sizes.molecules[k]
    }
    y[layout.waterAccount.rebasing] += water
    for (let j = 0; j < layout.nucleusClasses; j++) {
      const place = level * layout.nucleusClasses + j
      y[layout.nucleusAccount.rebasing + j] +=
        scale(layout.nuclei + place) + scale(layout.cores + place)
    }
  }
}
