import type { Diagnosis } from '../../src/model/diagnostics/diagnose.ts'
import { type LayerShape, layerShape } from '../../src/model/diagnostics/layer.ts'
import type { Column } from '../../src/model/simulate.ts'

/** A layer in one quantity at one time, null without a cloud. */
export function shapeOf(
  { grid }: Column,
  { profiles }: Diagnosis,
  quantity: string,
): LayerShape | null {
  return layerShape(
    profiles[quantity],
    profiles.displaced_altitude_km.map((z) => 1000 * z),
    profiles.stretching.map((stretch) => stretch * grid.spacing_m),
  )
}

/** A profile between its levels, linear in true altitude; NaN outside the column. */
export function valueAt({ profiles }: Diagnosis, quantity: string, altitude_m: number): number {
  const z = profiles.displaced_altitude_km
  const above = z.findIndex((level) => 1000 * level >= altitude_m)
  if (above < 1) return Number.NaN
  const share = (altitude_m / 1000 - z[above - 1]) / (z[above] - z[above - 1])
  const [low, high] = [profiles[quantity][above - 1], profiles[quantity][above]]
  return low + share * (high - low)
}
