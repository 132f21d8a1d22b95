import { AIR_MOLECULE_MASS, BOLTZMANN } from '../constants.ts'
import { centrePoint } from '../grid.ts'
import { fallSpeed } from '../processes/fallSpeed.ts'
import { saturationPressure } from '../processes/saturationPressure.ts'
import type { Column } from '../state/column.ts'
import { KILOMETRE, PPMV } from '../units.ts'
import { frostPoint } from './frostPoint.ts'
import { type Computed, describe, type Variable, variable } from './variables.ts'
import { airAt, perLevel } from './view.ts'

/** The prescribed air level by level, before anything is integrated. */
export interface BackgroundTable {
  variables: Variable[]
  columns: Record<string, Float64Array>
  errors: {
    /** Largest departure of the pressure difference across a cell from the weight of its air, relative. */
    hydrostatic: number
    /** Smallest thickness of a displaced layer over that at rest, in the whole run. */
    smallest_stretching: number
    /** Smallest share of the requested wave amplitude that is left after holding it below the convective limit. */
    held_wave_share: number
  }
}

interface Background {
  column: Column
  air: ReturnType<typeof airAt>
  gravity: Float64Array
}

const list: Computed<Background, Float64Array>[] = [
  {
    ...variable('altitude_km', 'altitude of the air at rest', 'km', 'altitude'),
    compute: ({ column }) => column.grid.centres_m.map((z) => z / KILOMETRE),
  },
  {
    ...variable('temperature_K', 'air temperature', 'K', 'air_temperature'),
    compute: ({ column, air }) => perLevel(column, (point) => air.temperature_K[point]),
  },
  {
    ...variable('pressure_Pa', 'air pressure', 'Pa', 'air_pressure'),
    compute: ({ column, air }) => perLevel(column, (point) => air.pressure_Pa[point]),
  },
  {
    ...variable('water_ppmv', 'water vapour', 'ppmv', 'mole_fraction_of_water_vapor_in_air'),
    compute: ({ column, air }) => perLevel(column, (point) => air.water[point] / PPMV),
  },
  {
    ...variable('saturation_ratio', 'saturation ratio over flat ice', '1'),
    compute: ({ column, air }) =>
      perLevel(column, (point) => {
        const pressure = saturationPressure(
          column.scenario.ice.saturation,
          air.temperature_K[point],
        )
        return (air.water[point] * air.pressure_Pa[point]) / pressure
      }),
  },
  {
    ...variable('frost_point_K', 'frost point', 'K'),
    compute: ({ column, air }) =>
      perLevel(column, (point) =>
        frostPoint(column.scenario.ice.saturation, air.water[point] * air.pressure_Pa[point]),
      ),
  },
  ...[30, 60].map(
    (radius_nm): Computed<Background, Float64Array> => ({
      ...variable(
        `fall_speed_${radius_nm}nm_cm_per_s`,
        `fall speed of ice of ${radius_nm} nm`,
        'cm s-1',
      ),
      compute: ({ column, air, gravity }) =>
        perLevel(column, (point) => {
          const { density, dragDelta, slip } = column.scenario.ice
          const speed = fallSpeed({
            radius_m: radius_nm * 1e-9,
            temperature_K: air.temperature_K[point],
            pressure_Pa: air.pressure_Pa[point],
            gravity: gravity[point],
            density,
            dragDelta,
            slip,
          })
          return speed * 100
        }),
    }),
  ),
  {
    ...variable('displacement_m', 'displacement by waves', 'm'),
    compute: ({ column, air }) => perLevel(column, (point) => air.displacement_m[point]),
  },
]

export function backgroundTable(column: Column, time_s: number): BackgroundTable {
  const { rebaseTimes_s } = column.atmosphere
  const basis = column.atmosphere.basis(Math.max(0, ...rebaseTimes_s.filter((t) => t <= time_s)))
  const air = airAt(column, basis, time_s)
  const background = { column, air, gravity: basis.rest.gravity_m_per_s2 }
  return {
    variables: list.map(describe),
    columns: Object.fromEntries(list.map(({ name, compute }) => [name, compute(background)])),
    errors: {
      hydrostatic: hydrostaticError(column, basis.rest),
      smallest_stretching: column.survey.smallestStretching,
      held_wave_share: Math.min(...basis.waves.heldShare),
    },
  }
}

/** Across each cell: dp against the weight of its air with the trapezoidal rule, over dp. */
function hydrostaticError(
  { grid }: Column,
  rest: { pressure_Pa: Float64Array; temperature_K: Float64Array; gravity_m_per_s2: Float64Array },
): number {
  const weight = (point: number) =>
    (AIR_MOLECULE_MASS * rest.gravity_m_per_s2[point]) / (BOLTZMANN * rest.temperature_K[point])
  let worst = 0
  for (let i = 0; i < grid.levels; i++) {
    const point = centrePoint(i)
    const change = Math.log(rest.pressure_Pa[point - 1] / rest.pressure_Pa[point + 1])
    const expected =
      ((weight(point - 1) + 4 * weight(point) + weight(point + 1)) / 6) * grid.spacing_m
    worst = Math.max(worst, Math.abs(change / expected - 1))
  }
  return worst
}
