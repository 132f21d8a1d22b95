import { type AirState, makeAirState } from '../atmosphere/airState.ts'
import type { AirBasis } from '../atmosphere/atmosphere.ts'
import { centrePoint } from '../grid.ts'
import type { Column } from '../state/column.ts'
import { type LightTable, makeLightTables } from './lightTables.ts'

/** What is diagnosed: a state of the column at a time, and the balance to which its air density belongs. */
export interface ColumnMoment {
  time_s: number
  y: ArrayLike<number>
  basisTime_s: number
}

/** A column seen by an observer: the displaced air, and number densities in it. */
export interface View {
  column: Column
  moment: ColumnMoment
  basis: AirBasis
  air: AirState
  light: LightTable[]
  /** True number density of ice, N (n/n0), level by level, 1/m3. */
  numberPerClass: Float64Array
  /** Sums over the classes of N r^p for p = 0, 1, 2, 3, level by level, m^(p-3). */
  radiusMoments: Float64Array[]
  /** Thickness of the displaced layers, (1 + Z) dz0, m. */
  thickness_m: Float64Array
  /** True altitude of the displaced layers, m. */
  altitude_m: Float64Array
}

/** Cross-sections of each column, so that a series of moments costs them once. */
const lightTables = new WeakMap<Column, LightTable[]>()

function lightOf(column: Column): LightTable[] {
  const known = lightTables.get(column) ?? makeLightTables(column)
  lightTables.set(column, known)
  return known
}

/** A moment at the edge of a step or pulse belongs to the time before it, save at the very start. */
const INSTANT = 1e-3

/** The air of a column at a time, in a record of its own. */
export function airAt(column: Column, basis: AirBasis, time_s: number): AirState {
  const before_s = Math.max(time_s - INSTANT, 0)
  const air = column.atmosphere.read(basis, time_s, { from_s: before_s, to_s: before_s })
  const copy = makeAirState(air.temperature_K.length)
  for (const key of Object.keys(copy) as (keyof AirState)[]) {
    const values = air[key]
    if (values instanceof Float64Array) (copy[key] as Float64Array).set(values)
  }
  return copy
}

export function viewColumn(column: Column, moment: ColumnMoment): View {
  const { grid, layout } = column
  const light = lightOf(column)
  const basis = column.atmosphere.basis(moment.basisTime_s)
  const air = airAt(column, basis, moment.time_s)
  const numberPerClass = new Float64Array(layout.levels * layout.classes)
  for (let i = 0; i < layout.levels; i++) {
    const ratio = air.densityRatio[centrePoint(i)]
    for (let k = 0; k < layout.classes; k++) {
      const cell = i * layout.classes + k
      numberPerClass[cell] = moment.y[layout.ice + cell] * ratio
    }
  }
  const view = { column, moment, basis, air, light, numberPerClass }
  return {
    ...view,
    radiusMoments: [0, 1, 2, 3].map((power) => {
      const radii = column.sizes.radii_m.map((radius) => radius ** power)
      return perLevel(column, (_, i) => classSum(view, i, radii))
    }),
    thickness_m: perLevel(column, (point) => grid.spacing_m * (1 + air.stretching[point])),
    altitude_m: perLevel(column, (point, i) => grid.centres_m[i] + air.displacement_m[point]),
  }
}

/** A value for every level from its place in the half points. */
export function perLevel(
  { grid }: Column,
  value: (point: number, level: number) => number,
): Float64Array {
  return Float64Array.from({ length: grid.levels }, (_, i) => value(centrePoint(i), i))
}

/** Sum over the classes of a level of number density times a value per class. */
export function classSum(
  { column, numberPerClass }: Pick<View, 'column' | 'numberPerClass'>,
  level: number,
  value: Float64Array,
): number {
  const { classes } = column.layout
  let sum = 0
  for (let k = 0; k < classes; k++) sum += numberPerClass[level * classes + k] * value[k]
  return sum
}
