import type { AltitudeGrid, RadiusClasses } from '../grid.ts'
import type { StateLayout } from './layout.ts'

/** What places a number in the column: the two axes and the layout of the state. */
export interface ColumnAxes {
  grid: AltitudeGrid
  sizes: RadiusClasses
  layout: StateLayout
}
