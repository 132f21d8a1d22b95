import type { Column } from '../../src/model/simulate.ts'
import { columnTotals } from '../../src/model/state/columnTotals.ts'

/** The water in all cells with negative ice, over all water of the column. */
export function negativeIceShare(column: Column, y: ArrayLike<number>): number {
  const { layout, sizes, grid } = column
  let missing = 0
  for (let cell = 0; cell < layout.levels * layout.classes; cell++) {
    const number = y[layout.ice + cell]
    if (number < 0) missing -= number * sizes.molecules[cell % layout.classes] * grid.spacing_m
  }
  const { vapour, ice } = columnTotals(y, column)
  return missing / (vapour + ice)
}
