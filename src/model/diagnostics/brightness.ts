import { HOUR, KILOMETRE, NANOMETRE } from '../units.ts'
import { type LayerShape, layerShape } from './layer.ts'
import type { LightTable } from './lightTables.ts'
import { type Computed, describe, type Variable, variable } from './variables.ts'
import { classSum, perLevel, type View } from './view.ts'

/** The brightness of a column in one channel. */
interface ChannelView {
  time_s: number
  light: LightTable
  rayleigh: { albedo: number; shape: LayerShape | null }
  mie: { albedo: number; shape: LayerShape | null }
}

type BrightnessVariable = Computed<ChannelView, number | string>

const lidar = ({ light }: ChannelView) => light.channel.geometry.kind === 'backscatter'

/** The variables of `brightness.arrow`, one row per time and channel. Rayleigh is the headline, Mie stands beside it. */
const list: BrightnessVariable[] = [
  {
    ...variable('time_h', 'time since the start of the run', 'h', 'time'),
    compute: ({ time_s }) => time_s / HOUR,
  },
  {
    ...variable('channel', 'name of the channel', ''),
    type: 'text',
    compute: ({ light }) => light.channel.name,
  },
  {
    ...variable('wavelength_nm', 'wavelength', 'nm', 'radiation_wavelength'),
    compute: ({ light }) => light.channel.wavelength_m / NANOMETRE,
  },
  {
    ...variable(
      'albedo_per_sr',
      'directional albedo (for a lidar: backscatter integrated over the column), Rayleigh, upper bound in the ultraviolet',
      'sr-1',
    ),
    compute: ({ rayleigh }) => rayleigh.albedo,
  },
  {
    ...variable('albedo_mie_per_sr', 'the same for Lorenz-Mie spheres', 'sr-1'),
    compute: ({ mie }) => mie.albedo,
  },
  {
    ...variable('mie_to_rayleigh', 'Lorenz-Mie albedo over Rayleigh albedo', '1'),
    compute: ({ mie, rayleigh }) =>
      rayleigh.albedo > 0 ? mie.albedo / rayleigh.albedo : Number.NaN,
  },
  {
    ...variable(
      'peak_backscatter_per_m_sr',
      'largest backscatter coefficient, Rayleigh',
      'm-1 sr-1',
    ),
    compute: (view) => (lidar(view) ? (view.rayleigh.shape?.peak ?? 0) : Number.NaN),
  },
  {
    ...variable(
      'peak_backscatter_mie_per_m_sr',
      'largest backscatter coefficient, Lorenz-Mie',
      'm-1 sr-1',
    ),
    compute: (view) => (lidar(view) ? (view.mie.shape?.peak ?? 0) : Number.NaN),
  },
  {
    ...variable(
      'peak_altitude_km',
      'true altitude of the brightest layer, Rayleigh',
      'km',
      'altitude',
    ),
    compute: ({ rayleigh }) => (rayleigh.shape?.peakAltitude_m ?? Number.NaN) / KILOMETRE,
  },
  {
    ...variable(
      'centroid_altitude_km',
      'true altitude of the centre of brightness, Rayleigh',
      'km',
      'altitude',
    ),
    compute: ({ rayleigh }) => (rayleigh.shape?.centroid_m ?? Number.NaN) / KILOMETRE,
  },
  {
    ...variable('thickness_km', 'full width at half the largest brightness, Rayleigh', 'km'),
    compute: ({ rayleigh }) => (rayleigh.shape?.thickness_m ?? Number.NaN) / KILOMETRE,
  },
]

export function brightnessVariables(): Variable[] {
  return list.map(describe)
}

/** One list of values per variable, one value per channel. */
export function brightness(view: View): Record<string, (number | string)[]> {
  const channels = view.light.map(
    (light): ChannelView => ({
      time_s: view.moment.time_s,
      light,
      rayleigh: lookAt(view, light.rayleigh, light.slant),
      mie: lookAt(view, light.mie, light.slant),
    }),
  )
  return Object.fromEntries(list.map(({ name, compute }) => [name, channels.map(compute)]))
}

/** A(Theta) = sec(view) sum of N (d sigma/d Omega) dz over the layers as displaced, 1/sr. */
function lookAt(
  view: View,
  crossSections: Float64Array,
  slant: number,
): { albedo: number; shape: LayerShape | null } {
  const scattering = perLevel(view.column, (_, i) => classSum(view, i, crossSections))
  let albedo = 0
  for (let i = 0; i < scattering.length; i++) albedo += scattering[i] * view.thickness_m[i]
  return {
    albedo: slant * albedo,
    shape: layerShape(scattering, view.altitude_m, view.thickness_m),
  }
}
