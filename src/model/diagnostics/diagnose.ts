import type { Scenario } from '../scenario/types.ts'
import type { Column } from '../state/column.ts'
import { brightness } from './brightness.ts'
import { budget } from './budget.ts'
import { computedProfiles } from './profileVariables.ts'
import { type Variable, variable } from './variables.ts'
import { type ColumnMoment, viewColumn } from './view.ts'

/** Everything that is told of a column at one time; NaN stands for what does not apply. */
export interface Diagnosis {
  time_s: number
  /** One value per level for every profile variable. */
  profiles: Record<string, Float64Array>
  /** True number density per class, level by level, 1/m3. */
  numberPerClass: Float64Array
  /** One value per channel for every brightness variable. */
  brightness: Record<string, (number | string)[]>
  budget: Record<string, number>
}

export function diagnose(column: Column, moment: ColumnMoment): Diagnosis {
  const view = viewColumn(column, moment)
  const profiles = computedProfiles(column.scenario).map(
    ({ name, compute }): [string, Float64Array] => [name, compute(view)],
  )
  return {
    time_s: moment.time_s,
    profiles: Object.fromEntries(profiles),
    numberPerClass: view.numberPerClass,
    brightness: brightness(view),
    budget: budget(view),
  }
}

/** The variables of `size-distribution.arrow`, one row per time and level. */
export function sizeVariables(_scenario: Scenario): Variable[] {
  return [
    variable('time_h', 'time since the start of the run', 'h', 'time'),
    variable('altitude_km', 'altitude of the air at rest', 'km', 'altitude'),
    variable(
      'number_per_class_per_m3',
      'number density of ice particles in each radius class',
      'm-3',
    ),
  ]
}
