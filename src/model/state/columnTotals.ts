import type { ColumnAxes } from './axes.ts'

/** Column totals per unit resting area, 1/m2. */
export interface ColumnTotals {
  vapour: number
  /** Water molecules in ice. */
  ice: number
  /** Nuclei of each class, free and inside ice. */
  nuclei: number[]
}

export function columnTotals(
  y: ArrayLike<number>,
  { grid, sizes, layout }: ColumnAxes,
): ColumnTotals {
  const { levels, classes, nucleusClasses } = layout
  const totals: ColumnTotals = { vapour: 0, ice: 0, nuclei: new Array(nucleusClasses).fill(0) }
  for (let level = 0; level < levels; level++) {
    totals.vapour += y[layout.vapour + level] * grid.spacing_m
    for (let k = 0; k < classes; k++) {
      totals.ice += y[layout.ice + level * classes + k] * sizes.molecules[k] * grid.spacing_m
    }
    for (let j = 0; j < nucleusClasses; j++) {
      const place = level * nucleusClasses + j
      totals.nuclei[j] += (y[layout.nuclei + place] + y[layout.cores + place]) * grid.spacing_m
    }
  }
  return totals
}
