import { type Curve, monotoneCubic } from '../numerics/monotoneCubic.ts'
import type { Profile } from '../scenario/types.ts'

/** Share of the later of two neighbouring profiles at a time; constant before the first and after the last. */
interface TimePlace {
  index: number
  share: number
}

function timePlace(times_s: readonly number[], time_s: number): TimePlace {
  const last = times_s.length - 1
  if (last === 0 || time_s <= times_s[0]) return { index: 0, share: 0 }
  if (time_s >= times_s[last]) return { index: last, share: 0 }
  let index = 0
  while (times_s[index + 1] <= time_s) index++
  return { index, share: (time_s - times_s[index]) / (times_s[index + 1] - times_s[index]) }
}

function curvesOf(profile: Profile): Curve[] {
  return profile.values.map((values) => {
    const curve = monotoneCubic(
      profile.altitudes_m,
      profile.logarithmic ? values.map(Math.log) : values,
    )
    if (!profile.logarithmic) return curve
    return {
      value: (z) => Math.exp(curve.value(z)),
      slope: (z) => Math.exp(curve.value(z)) * curve.slope(z),
    }
  })
}

/** The profile at one instant as a curve in altitude: monotone cubic in altitude, linear in time. */
export function profileCurve(profile: Profile, time_s: number): Curve {
  const { index, share } = timePlace(profile.times_s, time_s)
  const curves = curvesOf(profile)
  if (share === 0) return curves[index]
  const [earlier, later] = [curves[index], curves[index + 1]]
  return {
    value: (z) => (1 - share) * earlier.value(z) + share * later.value(z),
    slope: (z) => (1 - share) * earlier.slope(z) + share * later.slope(z),
  }
}

/** A profile sampled once on fixed altitudes, so that reading it at a time costs one linear interpolation. */
export interface ProfileSeries {
  steady: boolean
  read(time_s: number, into: Float64Array): void
}

/**
 * @param altitudes_m where to sample
 * @param outside what holds beyond the outermost knots: 'line' goes on with the end slope, 'constant' holds the end value
 */
export function profileSeries(
  profile: Profile,
  altitudes_m: Float64Array,
  outside: 'line' | 'constant',
): ProfileSeries {
  const knots = profile.altitudes_m
  const [lowest, highest] = [knots[0], knots[knots.length - 1]]
  const clamp = (z: number) => Math.min(Math.max(z, lowest), highest)
  const samples = curvesOf(profile).map((curve) =>
    altitudes_m.map((z) => curve.value(outside === 'constant' ? clamp(z) : z)),
  )
  return {
    steady: samples.length === 1,
    read(time_s, into) {
      const { index, share } = timePlace(profile.times_s, time_s)
      if (share === 0) {
        into.set(samples[index])
        return
      }
      const [earlier, later] = [samples[index], samples[index + 1]]
      for (let i = 0; i < into.length; i++) into[i] = (1 - share) * earlier[i] + share * later[i]
    },
  }
}
