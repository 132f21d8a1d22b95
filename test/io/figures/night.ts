import type { Night } from '../../../src/io/figures/nightPicture.ts'
import type { TimeHeightField } from '../../../src/io/figures/timeHeightField.ts'

export const SPACING_KM = 0.25

/** A field made of a function of time and altitude: 9 times over 24 h, 77 to 96 km. */
export function madeField(
  longName: string,
  unit: string,
  value: (time_h: number, altitude_km: number) => number,
): TimeHeightField {
  const times_h = Float64Array.from({ length: 9 }, (_, i) => 3 * i)
  const altitudes_km = Float64Array.from({ length: 77 }, (_, i) => 77 + SPACING_KM * i)
  const values = Float64Array.from(
    [...times_h].flatMap((time_h) => [...altitudes_km].map((z) => value(time_h, z))),
  )
  return { longName, unit, times_h, altitudes_km, values }
}

/** A layer at 83 km, 1 km wide (standard deviation), that grows with time. */
export const layer = madeField('mass of ice per volume', 'ng m-3', (time_h, z) =>
  time_h === 0 ? 0 : time_h * Math.exp(-((z - 83) ** 2) / 2),
)

export function madeNight(title = 'A night'): Night {
  const series = (factor: number) => layer.times_h.map((time_h) => factor * time_h ** 3)
  return {
    title,
    description: 'A layer at 83 km.',
    iceWaterContent: layer,
    saturationRatio: madeField('saturation ratio', '1', (_, z) => 1 + (z - 82) / 2),
    brightness: {
      times_h: layer.times_h,
      unit: 'sr-1',
      channels: [
        { label: '260 nm albedo', rayleigh: series(1e-9), mie: series(5e-10) },
        { label: '532 nm backscatter', rayleigh: series(1e-10), mie: series(8e-11) },
      ],
    },
  }
}
