/**
 * How the column is integrated, what looks at it, and what is written.
 */
import { z } from 'zod'
import {
  choice,
  given,
  instants,
  optionalNumber,
  quantity,
  section,
  wholeNumber,
} from './fields.ts'
import { channelDefaults, numericsDefaults, outputDefaults } from './modelDefaults.ts'

export const numericsSection = section('Accuracy of the integration', {
  relative_tolerance: quantity(
    'Relative tolerance of the integration',
    { from: 1e-12, to: 0.1 },
    numericsDefaults.relative_tolerance,
  ),
  absolute_tolerance_ice_per_m3: quantity(
    'Absolute tolerance for ice of 10 nm and below; it falls as (10 nm/r)^6 above',
    { unit: '1/m3', above: 0, to: 1e6 },
    numericsDefaults.absolute_tolerance_ice_per_m3,
  ),
  absolute_tolerance_vapour_per_m3: quantity(
    'Absolute tolerance for water vapour',
    { unit: '1/m3', above: 0, to: 1e15 },
    numericsDefaults.absolute_tolerance_vapour_per_m3,
  ),
  sublimation_ceiling_s: quantity(
    'Shortest time in which sublimation takes a particle through one class',
    { unit: 's', above: 0, to: 3600 },
    numericsDefaults.sublimation_ceiling_s,
  ),
  nucleation_ceiling_s: quantity(
    'Shortest time in which a nucleus becomes ice',
    { unit: 's', above: 0, to: 3600 },
    numericsDefaults.nucleation_ceiling_s,
  ),
  max_steps_per_interval: wholeNumber(
    'Steps between two outputs after which the run gives up',
    { from: 10, to: 1e8 },
    numericsDefaults.max_steps_per_interval,
  ),
  break_points_h: instants(
    'Further instants that the integration meets exactly',
    { unit: 'h', above: 0, to: 1e6 },
    numericsDefaults.break_points_h,
  ),
  extrapolation_columns: wholeNumber(
    'Extrapolation columns of the integrator',
    { from: 3, to: 9 },
    numericsDefaults.extrapolation_columns,
  ),
})

const { scattering_angle_deg, view_zenith_deg } = channelDefaults

export const channelsList = z
  .array(
    z.strictObject({
      name: z
        .string()
        .regex(/^[a-z0-9]+(_[a-z0-9]+)*$/)
        .max(40)
        .describe('Name of the channel in the output: lower-case letters, digits, underscores.'),
      wavelength_nm: given('Wavelength', { unit: 'nm', from: 10, to: 1e5 }),
      geometry: z
        .enum(['albedo', 'backscatter'])
        .describe('What is seen: albedo (scattered sunlight) or backscatter (lidar).'),
      refractive_index: z
        .strictObject({
          n: given('Real part', { above: 0, to: 20 }),
          k: given('Imaginary part', { from: 0, to: 20 }),
        })
        .optional()
        .describe(
          'Complex refractive index n + ik of ice. Default: Warren and Brandt 2008, from 0.2 to 15 micrometres.',
        ),
      scattering_angle_deg: optionalNumber(
        'Scattering angle of an albedo',
        { unit: 'degrees', from: 0, to: 180 },
        `Default ${scattering_angle_deg.value}: ${scattering_angle_deg.reason}`,
      ),
      view_zenith_deg: optionalNumber(
        'Zenith angle of the line of sight of an albedo',
        { unit: 'degrees', from: 0, to: 85 },
        `Default ${view_zenith_deg.value}: ${view_zenith_deg.reason}`,
      ),
    }),
  )
  .max(50)
  .default(channelDefaults.list.value)
  .describe(
    `Wavelengths and geometries that look at the cloud. Default ${channelDefaults.list.value.map(({ name }) => name).join(', ')}: ${channelDefaults.list.reason}.`,
  )

export const outputSection = section('What is written', {
  size_distribution: choice(
    'Whether the number of particles in each class is written',
    ['auto', 'always', 'never'],
    outputDefaults.size_distribution,
  ),
  state_every_h: quantity(
    'Interval of the states from which a run can be continued',
    { unit: 'h', above: 0, to: 1e5 },
    outputDefaults.state_every_h,
  ),
})
