/** A quantity against time and altitude, on evenly spaced times and altitudes. */
export interface TimeHeightField {
  longName: string
  unit: string
  times_h: Float64Array
  altitudes_km: Float64Array
  /** All altitudes of the first time, then those of the second, and so on. */
  values: Float64Array
}

/** The levels of a field from one altitude to another. */
export function cropped(
  field: TimeHeightField,
  [lowest_km, highest_km]: readonly [number, number],
): TimeHeightField {
  const inside = (altitude_km: number) => altitude_km >= lowest_km && altitude_km <= highest_km
  const count = field.altitudes_km.length
  return {
    ...field,
    altitudes_km: field.altitudes_km.filter(inside),
    values: field.values.filter((_, i) => inside(field.altitudes_km[i % count])),
  }
}

/** The values of one time, by its number. */
export function profileAt(field: TimeHeightField, time: number): Float64Array {
  const count = field.altitudes_km.length
  return field.values.subarray(time * count, (time + 1) * count)
}

/** The largest value, not below zero; what has no value is passed over. */
export function largestValue({ values }: TimeHeightField): number {
  return values.reduce((most, value) => (Number.isNaN(value) ? most : Math.max(most, value)), 0)
}
