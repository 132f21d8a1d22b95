import { WATER_MOLECULE_MASS } from '../constants.ts'
import { centrePoint } from '../grid.ts'
import { saturationPressure } from '../processes/saturationPressure.ts'
import type { Channel, Scenario } from '../scenario/types.ts'
import { HOUR, KILOMETRE, NANOGRAM, NANOMETRE, PER_CUBIC_CENTIMETRE, PPMV } from '../units.ts'
import { frostPoint } from './frostPoint.ts'
import { type Computed, describe, type Variable, variable } from './variables.ts'
import { airAt, classSum, perLevel, type View } from './view.ts'

type ProfileVariable = Computed<View, Float64Array>

/** Fewer ice particles than this have no size worth telling, 1/m3. */
const FEWEST = 1

/** Half the time over which the vertical wind of the waves is taken, s. */
const MOMENT = 1

function profile(description: Variable, compute: (view: View) => Float64Array): ProfileVariable {
  return { ...description, compute }
}

/** The variables of `profiles.arrow`, one row per time and level. */
export function profileVariables(scenario: Scenario): Variable[] {
  return computedProfiles(scenario).map(describe)
}

export function computedProfiles(scenario: Scenario): ProfileVariable[] {
  const lidars = scenario.channels.filter(({ geometry }) => geometry.kind === 'backscatter')
  return [...axes, ...airProfiles, ...waterProfiles, ...iceProfiles, ...lidars.flatMap(backscatter)]
}

const axes: ProfileVariable[] = [
  profile(
    variable('time_h', 'time since the start of the run', 'h', 'time'),
    ({ column, moment }) => perLevel(column, () => moment.time_s / HOUR),
  ),
  profile(variable('altitude_km', 'altitude of the air at rest', 'km', 'altitude'), ({ column }) =>
    perLevel(column, (_, i) => column.grid.centres_m[i] / KILOMETRE),
  ),
  profile(
    variable(
      'displaced_altitude_km',
      'altitude of the air as displaced by waves',
      'km',
      'altitude',
    ),
    ({ altitude_m }) => altitude_m.map((z) => z / KILOMETRE),
  ),
]

const airProfiles: ProfileVariable[] = [
  profile(variable('temperature_K', 'air temperature', 'K', 'air_temperature'), ({ column, air }) =>
    perLevel(column, (point) => air.temperature_K[point]),
  ),
  profile(variable('pressure_Pa', 'air pressure', 'Pa', 'air_pressure'), ({ column, air }) =>
    perLevel(column, (point) => air.pressure_Pa[point]),
  ),
  profile(
    variable('air_density_per_cm3', 'number density of air', 'cm-3'),
    ({ column, air, basis }) =>
      perLevel(
        column,
        (point) =>
          (basis.rest.density_per_m3[point] * air.densityRatio[point]) / PER_CUBIC_CENTIMETRE,
      ),
  ),
  profile(
    variable('stretching', 'thickness of a layer of air over that at rest', '1'),
    ({ column, air }) => perLevel(column, (point) => 1 + air.stretching[point]),
  ),
  profile(
    variable('wave_wind_m_per_s', 'vertical wind of the waves', 'm s-1', 'upward_air_velocity'),
    ({ column, basis, moment }) => {
      if (column.scenario.waves.length === 0) return new Float64Array(column.grid.levels)
      const before = airAt(column, basis, moment.time_s - MOMENT)
      const after = airAt(column, basis, moment.time_s + MOMENT)
      return perLevel(
        column,
        (point) => (after.displacement_m[point] - before.displacement_m[point]) / (2 * MOMENT),
      )
    },
  ),
]

/** Partial pressure of water vapour of a level, q p, Pa. */
function vapourPressure({ column, moment, air, basis }: View, level: number): number {
  const point = centrePoint(level)
  const mixingRatio = moment.y[column.layout.vapour + level] / basis.rest.density_per_m3[point]
  return mixingRatio * air.pressure_Pa[point]
}

const waterProfiles: ProfileVariable[] = [
  profile(
    variable('water_ppmv', 'water vapour', 'ppmv', 'mole_fraction_of_water_vapor_in_air'),
    ({ column, moment, basis }) =>
      perLevel(
        column,
        (point, i) => moment.y[column.layout.vapour + i] / basis.rest.density_per_m3[point] / PPMV,
      ),
  ),
  profile(
    variable('total_water_ppmv', 'water vapour and ice together', 'ppmv'),
    ({ column, moment, basis }) => {
      const { layout, sizes } = column
      return perLevel(column, (point, i) => {
        let water = moment.y[layout.vapour + i]
        for (let k = 0; k < layout.classes; k++) {
          water += moment.y[layout.ice + i * layout.classes + k] * sizes.molecules[k]
        }
        return water / basis.rest.density_per_m3[point] / PPMV
      })
    },
  ),
  profile(variable('saturation_ratio', 'saturation ratio over flat ice', '1'), (view) =>
    perLevel(view.column, (point, i) => {
      const { saturation } = view.column.scenario.ice
      return vapourPressure(view, i) / saturationPressure(saturation, view.air.temperature_K[point])
    }),
  ),
  profile(variable('frost_point_K', 'frost point', 'K'), (view) =>
    perLevel(view.column, (_, i) =>
      frostPoint(view.column.scenario.ice.saturation, vapourPressure(view, i)),
    ),
  ),
]

const iceProfiles: ProfileVariable[] = [
  profile(
    variable('free_nuclei_per_cm3', 'number density of nuclei without ice', 'cm-3'),
    ({ column, moment, air }) => {
      const { layout } = column
      return perLevel(column, (point, i) => {
        let sum = 0
        for (let j = 0; j < layout.nucleusClasses; j++) {
          sum += moment.y[layout.nuclei + i * layout.nucleusClasses + j]
        }
        return (sum * air.densityRatio[point]) / PER_CUBIC_CENTIMETRE
      })
    },
  ),
  profile(
    variable('ice_number_per_cm3', 'number density of ice particles', 'cm-3'),
    ({ radiusMoments }) => radiusMoments[0].map((number) => number / PER_CUBIC_CENTIMETRE),
  ),
  profile(variable('mean_radius_nm', 'mean radius of the ice particles', 'nm'), (view) =>
    perLevel(view.column, (_, i) => spectrum(view, i).mean / NANOMETRE),
  ),
  profile(
    variable('effective_radius_nm', 'effective radius, third over second moment', 'nm'),
    (view) => perLevel(view.column, (_, i) => spectrum(view, i).effective / NANOMETRE),
  ),
  profile(variable('spectrum_width_nm', 'standard deviation of the radius', 'nm'), (view) =>
    perLevel(view.column, (_, i) => spectrum(view, i).width / NANOMETRE),
  ),
  profile(variable('ice_water_content_ng_per_m3', 'mass of ice per volume', 'ng m-3'), (view) =>
    perLevel(view.column, (_, i) => iceWaterContent(view, i) / NANOGRAM),
  ),
]

/** Mass of ice per volume of displaced air, kg/m3. */
export function iceWaterContent(view: View, level: number): number {
  return classSum(view, level, view.column.sizes.molecules) * WATER_MOLECULE_MASS
}

/** Mean, effective radius and standard deviation of a level, m; NaN where there is next to no ice. */
export function spectrum(
  { radiusMoments }: View,
  level: number,
): { mean: number; effective: number; width: number } {
  const [number, first, second, third] = radiusMoments.map((moment) => moment[level])
  if (!(number >= FEWEST)) return { mean: Number.NaN, effective: Number.NaN, width: Number.NaN }
  const mean = first / number
  return {
    mean,
    effective: third / second,
    width: Math.sqrt(Math.max(0, second / number - mean * mean)),
  }
}

/** Backscatter coefficient of a lidar channel, in the Rayleigh limit and for Mie spheres. */
function backscatter(channel: Channel): ProfileVariable[] {
  const table = (view: View) => view.light.find((light) => light.channel.name === channel.name)
  const named = (name: string, kind: string) =>
    variable(
      name,
      `backscatter coefficient at ${channel.wavelength_m / NANOMETRE} nm, ${kind}`,
      'm-1 sr-1',
    )
  const sum = (view: View, values: Float64Array | undefined) =>
    perLevel(view.column, (_, i) => (values ? classSum(view, i, values) : Number.NaN))
  return [
    profile(named(`backscatter_${channel.name}_per_m_sr`, 'Rayleigh'), (view) =>
      sum(view, table(view)?.rayleigh),
    ),
    profile(named(`backscatter_${channel.name}_mie_per_m_sr`, 'Lorenz-Mie'), (view) =>
      sum(view, table(view)?.mie),
    ),
  ]
}
