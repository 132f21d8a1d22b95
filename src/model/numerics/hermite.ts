/**
 * A smooth function on evenly spaced nodes, kept with its slopes and read between them by the cubic Hermite formula
 * (error h^4/384 times the fourth derivative).
 */
export interface HermiteTable {
  start: number
  spacing: number
  values: Float64Array
  slopes: Float64Array
}

/** Value of the table at x; beyond its ends the end value with the end slope. */
export function readHermite(table: HermiteTable, x: number): number {
  const { start, spacing, values, slopes } = table
  const last = values.length - 1
  const position = (x - start) / spacing
  if (position <= 0) return values[0] + slopes[0] * (x - start)
  if (position >= last) return values[last] + slopes[last] * (x - start - last * spacing)
  const i = Math.floor(position)
  const s = position - i
  const r = 1 - s
  return (
    r * r * ((1 + 2 * s) * values[i] + s * spacing * slopes[i]) +
    s * s * ((3 - 2 * s) * values[i + 1] - r * spacing * slopes[i + 1])
  )
}
