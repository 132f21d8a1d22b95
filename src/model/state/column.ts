import { type Atmosphere, makeAtmosphere } from '../atmosphere/atmosphere.ts'
import { type AirSurvey, surveyAir } from '../atmosphere/surveyAir.ts'
import { makeAltitudeGrid, makeRadiusClasses } from '../grid.ts'
import type { Scenario } from '../scenario/types.ts'
import type { ColumnAxes } from './axes.ts'
import { totalsAtStart } from './initialState.ts'
import { makeStateLayout } from './layout.ts'

/** A scenario made ready to run: its axes, the layout of its state, and its air. */
export interface Column extends ColumnAxes {
  scenario: Scenario
  atmosphere: Atmosphere
  survey: AirSurvey
}

/** @throws InputError where waves and perturbations make the air impossible */
export function prepareColumn(scenario: Scenario): Column {
  const grid = makeAltitudeGrid(scenario.grid)
  const sizes = makeRadiusClasses(scenario.sizes, scenario.ice.density)
  const nucleusClasses = scenario.background.nucleusClasses.length
  const atmosphere = makeAtmosphere(scenario, grid)
  const survey = surveyAir(atmosphere, grid, scenario.duration_s)
  const layout = makeStateLayout(grid.levels, sizes.count, nucleusClasses)
  return { scenario, grid, sizes, layout, atmosphere, survey }
}

/**
 * What a saved state must agree on with the column that goes on from it: where its numbers stand, what they count, and
 * the air and the budget that they belong to.
 */
export function stateLayoutDescription(column: Column) {
  const { layout, scenario, sizes } = column
  const { temperature_K, referenceAltitude_m, referencePressure_Pa } = scenario.background
  return {
    layout,
    grid: scenario.grid,
    radii_m: Array.from(sizes.radii_m),
    nuclei_m: scenario.background.nucleusClasses.map(({ radius_m }) => radius_m),
    iceDensity: scenario.ice.density,
    air: { temperature_K, referenceAltitude_m, referencePressure_Pa },
    totalsAtStart: totalsAtStart(column),
  }
}
