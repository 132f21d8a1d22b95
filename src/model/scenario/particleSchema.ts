/**
 * Ice and its processes: size classes, properties of ice, nucleation, process switches, ice to start from.
 */
import { z } from 'zod'
import { sizeDefaults } from './defaults.ts'
import { altitude, choice, given, quantity, section, toggle, wholeNumber } from './fields.ts'
import { iceDefaults, nucleationDefaults, processDefaults } from './modelDefaults.ts'

export const sizesSection = section('Radius classes of the ice, finer at the small end', {
  smallest_nm: quantity(
    'Lower edge of the smallest class',
    { unit: 'nm', above: 0, to: 100 },
    sizeDefaults.smallest_nm,
  ),
  largest_nm: quantity(
    'Upper edge of the largest class',
    { unit: 'nm', above: 0, to: 5000 },
    sizeDefaults.largest_nm,
  ),
  classes: wholeNumber('Number of classes', { from: 4, to: 400 }, sizeDefaults.classes),
  stretching: quantity(
    'Stretching b of the edges r_min + (r_max - r_min)(e^(b xi) - 1)/(e^b - 1)',
    { from: 0.1, to: 10 },
    sizeDefaults.stretching,
  ),
})

export const iceSection = section('Properties of the ice particles', {
  density: quantity('Density of ice', { unit: 'kg/m3', above: 0, to: 1000 }, iceDefaults.density),
  accommodation: quantity(
    'Share of the molecules striking ice that stay',
    { above: 0, to: 1 },
    iceDefaults.accommodation,
  ),
  saturation: choice(
    'Formula of the saturation pressure over ice',
    ['murphy_koop_2005', 'iapws_2011', 'marti_mauersberger_1993'],
    iceDefaults.saturation,
  ),
  amorphous_offset: choice(
    'Where the higher vapour pressure of amorphous ice (982 J/mol, Nachbar et al. 2018) counts',
    ['none', 'nucleation', 'growth', 'both'],
    iceDefaults.amorphous_offset,
  ),
  particle_warming_K: quantity(
    'Steady excess of the particle temperature over the air',
    { unit: 'K', from: 0, to: 20 },
    iceDefaults.particle_warming_K,
  ),
  drag_delta: quantity(
    "Epstein's drag factor: 1 specular, 1 + pi/8 diffuse reflection",
    { from: 0.5, to: 2 },
    iceDefaults.drag_delta,
  ),
  slip: choice(
    'Passage from free-molecular to viscous drag',
    ['epstein_stokes', 'davies'],
    iceDefaults.slip,
  ),
})

export const nucleationSection = section('Formation of ice on nuclei', {
  scheme: choice(
    'Classical nucleation theory, barrierless activation at the Kelvin radius, or none',
    ['classical', 'activation', 'off'],
    nucleationDefaults.scheme,
  ),
  contact_parameter: quantity(
    'Cosine of the contact angle of ice on the nucleus',
    { from: -1, to: 1 },
    nucleationDefaults.contact_parameter,
  ),
  desorption_energy_J: quantity(
    'Desorption energy of a water molecule',
    { unit: 'J', above: 0, to: 1e-18 },
    nucleationDefaults.desorption_energy_J,
  ),
  surface_diffusion_energy_J: quantity(
    'Surface diffusion energy of a water molecule',
    { unit: 'J', above: 0, to: 1e-18 },
    nucleationDefaults.surface_diffusion_energy_J,
  ),
  vibration_frequency_per_s: quantity(
    'Vibration frequency of an adsorbed molecule',
    { unit: '1/s', above: 0, to: 1e16 },
    nucleationDefaults.vibration_frequency_per_s,
  ),
  jump_distance_nm: quantity(
    'Mean jump distance of an adsorbed molecule',
    { unit: 'nm', above: 0, to: 10 },
    nucleationDefaults.jump_distance_nm,
  ),
})

export const processesSection = section('Processes that can be switched off', {
  growth: toggle('Growth and sublimation of ice', processDefaults.growth),
  sedimentation: toggle('Fall of ice', processDefaults.sedimentation),
  diffusion: toggle('Eddy and molecular diffusion', processDefaults.diffusion),
  wind: toggle('Transport by the mean vertical wind', processDefaults.wind),
  closed: toggle(
    'Shuts top, bottom and sides and switches photolysis off: nothing enters or leaves',
    processDefaults.closed,
  ),
})

export const initialSection = section('State of the column at the start', {
  ice: z
    .array(
      z.strictObject({
        altitude_km: altitude('Centre of the layer'),
        width_km: given('Full width of the layer at half maximum', {
          unit: 'km',
          above: 0,
          to: 50,
        }),
        number_per_cm3: given('Number density at the centre', { unit: '1/cm3', from: 0, to: 1e6 }),
        median_radius_nm: given('Median radius', { unit: 'nm', above: 0, to: 5000 }),
        geometric_width: given('Geometric standard deviation of the log-normal radii', {
          above: 1,
          to: 10,
        }),
      }),
    )
    .max(100)
    .default([])
    .describe(
      'Layers of ice to start from, Gaussian in altitude and log-normal in radius. Default none: ice has to form.',
    ),
})
