import { type Atmosphere, makeAtmosphere } from '../atmosphere/atmosphere.ts'
import { makeAltitudeGrid, makeRadiusClasses } from '../grid.ts'
import type { Scenario } from '../scenario/types.ts'
import type { ColumnAxes } from './axes.ts'
import { makeStateLayout } from './layout.ts'

/** A scenario made ready to run: its axes, the layout of its state, and its air. */
export interface Column extends ColumnAxes {
  scenario: Scenario
  atmosphere: Atmosphere
}

export function prepareColumn(scenario: Scenario): Column {
  const grid = makeAltitudeGrid(scenario.grid)
  const sizes = makeRadiusClasses(scenario.sizes, scenario.ice.density)
  const nucleusClasses = scenario.background.nucleusClasses.length
  return {
    scenario,
    grid,
    sizes,
    layout: makeStateLayout(grid.levels, sizes.count, nucleusClasses),
    atmosphere: makeAtmosphere(scenario, grid),
  }
}

/** What a saved state must agree on with the column that goes on from it. */
export function stateLayoutDescription({ layout, scenario, sizes }: Column) {
  return {
    ...layout,
    grid: scenario.grid,
    radii_m: Array.from(sizes.radii_m),
    nuclei_m: scenario.background.nucleusClasses.map(({ radius_m }) => radius_m),
  }
}
