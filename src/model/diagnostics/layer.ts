/** Place and shape of a layer in a profile over altitude. */
export interface LayerShape {
  /** Largest value, in the unit of the profile. */
  peak: number
  peakAltitude_m: number
  /** Altitude of the centre of gravity. */
  centroid_m: number
  /** Full width at half the largest value, between the outermost crossings next to the peak. */
  thickness_m: number
}

/**
 * Shape of the layer in a profile; null where the profile is nowhere positive. The peak is the vertex of the parabola
 * through the largest value and its neighbours.
 *
 * @param values profile, any unit
 * @param altitude_m increasing altitudes of the values
 * @param thickness_m thickness of the layer of air that each value stands for
 */
export function layerShape(
  values: Float64Array,
  altitude_m: Float64Array,
  thickness_m: Float64Array,
): LayerShape | null {
  let top = 0
  let amount = 0
  let moment = 0
  for (let i = 0; i < values.length; i++) {
    if (values[i] > values[top]) top = i
    amount += values[i] * thickness_m[i]
    moment += values[i] * thickness_m[i] * altitude_m[i]
  }
  if (!(values[top] > 0) || !(amount > 0)) return null
  const { peak, altitude } = vertex(values, altitude_m, top)
  return {
    peak,
    peakAltitude_m: altitude,
    centroid_m: moment / amount,
    thickness_m:
      crossing(values, altitude_m, { top, half: peak / 2, step: 1 }) -
      crossing(values, altitude_m, { top, half: peak / 2, step: -1 }),
  }
}

function vertex(
  values: Float64Array,
  altitude_m: Float64Array,
  top: number,
): { peak: number; altitude: number } {
  const [peak, altitude] = [values[top], altitude_m[top]]
  if (top === 0 || top === values.length - 1) return { peak, altitude }
  const down = altitude_m[top - 1] - altitude
  const up = altitude_m[top + 1] - altitude
  const [below, above] = [values[top - 1] - peak, values[top + 1] - peak]
  const curvature = (above / up - below / down) / (up - down)
  if (!(curvature < 0)) return { peak, altitude }
  const slope = above / up - curvature * up
  const shift = Math.min(Math.max(-slope / (2 * curvature), down), up)
  return { peak: peak + shift * (slope + curvature * shift), altitude: altitude + shift }
}

function crossing(
  values: Float64Array,
  altitude_m: Float64Array,
  { top, half, step }: { top: number; half: number; step: 1 | -1 },
): number {
  let i = top
  while (i + step >= 0 && i + step < values.length) {
    const [inner, outer] = [values[i], values[i + step]]
    if (outer <= half) {
      const share = inner > half ? (inner - half) / (inner - outer) : 0
      return altitude_m[i] + share * (altitude_m[i + step] - altitude_m[i])
    }
    i += step
  }
  return altitude_m[i]
}
