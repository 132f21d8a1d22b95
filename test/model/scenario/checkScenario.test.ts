import { describe, expect, it } from 'vitest'
import { refusal } from './refusal.ts'

const layer = { altitude_km: 83, width_km: 1, number_per_cm3: 1, geometric_width: 1.2 }
const lidar = { name: 'a', wavelength_nm: 532, geometry: 'backscatter' }

describe('what is impossible together is refused', () => {
  it.each<[string, unknown, string]>([
    [
      'an output interval longer than the run',
      { duration_h: 1, output_every_min: 90 },
      'output_every_min: 90 is not allowed; allowed: at most the length of the run, 60 min',
    ],
    [
      'output without bounds',
      { duration_h: 10_000, output_every_min: 0.001 },
      'output_every_min: 0.001 makes 7.7e+10 output rows (times by levels); allowed: up to 5e+7',
    ],
    [
      'a top below the bottom',
      { grid: { bottom_km: 90, top_km: 80 } },
      'grid.top_km: 80 is not allowed; allowed: above bottom_km 90',
    ],
    [
      'classes of no width',
      { sizes: { smallest_nm: 50, largest_nm: 50 } },
      'sizes.largest_nm: 50 is not allowed; allowed: above smallest_nm 50',
    ],
    ['a scenario that nobody merged', { extends: 'other' }, 'extends: is not read yet'],
    [
      'nuclei outside the classes',
      { nuclei: { classes: [{ radius_nm: 0.5, share: 1 }] } },
      'nuclei.classes.0.radius_nm: 0.5 is not allowed; allowed: inside the radius classes, 1 to 150 nm',
    ],
    [
      'ice outside the classes',
      { initial: { ice: [{ ...layer, median_radius_nm: 400 }] } },
      'initial.ice.0.median_radius_nm: 400 is not allowed',
    ],
    ['two channels of one name', { channels: [lidar, lidar] }, 'channels.1.name: a is taken'],
    [
      'a lidar with a zenith angle',
      { channels: [{ ...lidar, view_zenith_deg: 10 }] },
      'channels.0.view_zenith_deg: has no meaning for backscatter',
    ],
    [
      'a wavelength without refractive index',
      { channels: [{ ...lidar, wavelength_nm: 100 }] },
      'channels.0.wavelength_nm: 100 is not allowed without a refractive_index; wavelength 0.1 um',
    ],
  ])('%s', (_, document, message) => {
    expect(refusal(document)).toContain(message)
  })
})
