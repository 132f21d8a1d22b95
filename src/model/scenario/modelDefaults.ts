/**
 * Defaults of the model itself, of waves and of the channels, each with its reason (see defaults.ts).
 */
import type { Default } from './defaults.ts'

function because<T>(value: T, reason: string): Default<T> {
  return { value, reason }
}

export const waveDefaults = {
  at_km: because(85, 'the region where the cloud forms'),
  phase_deg: because(0, 'the crest stands at the reference altitude when the run starts'),
  start_h: because(0, 'the wave belongs to the whole run'),
  rise_h: because(1, 'the run begins with the undisturbed column, without a jump'),
  displacement_share: because(1, 'a gravity wave displaces air adiabatically'),
  grows: because(true, 'an undamped wave keeps its energy as the air thins upward'),
}

export const randomWaveDefaults = {
  seed: because(1, 'any fixed number makes equal runs equal'),
  count: because(30, 'enough members for a field that does not repeat within a day'),
  rms_K: because(4, 'order of the variability near the summer mesopause, from memory'),
  periods_h: because([0.5, 8], 'gravity waves between buoyancy and tidal periods; invented'),
  vertical_wavelengths_km: because(
    [3, 20],
    'waves that a column of some tens of km can hold; invented',
  ),
  spectral_slope: because(3, 'saturated spectra fall with the cube of the wavenumber, from memory'),
}

export const iceDefaults = {
  density: because(932, 'hexagonal ice near 130 K; common practice, no source'),
  accommodation: because(0.83, 'common practice for cold ice, from memory'),
  saturation: because('murphy_koop_2005' as const, 'the formula most used for cold ice'),
  amorphous_offset: because('none' as const, 'hexagonal ice is the plain case'),
  particle_warming_K: because(0, 'small particles take the temperature of the air'),
  drag_delta: because(1 + Math.PI / 8, 'diffuse reflection at the temperature of the air'),
  slip: because('epstein_stokes' as const, 'exact in the free-molecular limit, where the cloud is'),
}

export const nucleationDefaults = {
  scheme: because('classical' as const, 'nucleation theory on a curved nucleus'),
  contact_parameter: because(0.95, 'common practice; measured between 0.84 and 0.98 on dusts'),
  desorption_energy_J: because(2.9e-20, 'from memory'),
  surface_diffusion_energy_J: because(2.9e-21, 'a tenth of the desorption energy, from memory'),
  vibration_frequency_per_s: because(1e13, 'from memory'),
  jump_distance_nm: because(0.32, 'from memory'),
}

export const processDefaults = {
  growth: because(true, 'ice lives by it'),
  sedimentation: because(true, 'ice falls'),
  diffusion: because(true, 'the air is mixed'),
  wind: because(true, 'the polar-summer air rises'),
  closed: because(false, 'the column breathes at its top, bottom and sides'),
}

export const numericsDefaults = {
  relative_tolerance: because(1e-3, 'tighter changes the brightness by less than 0.1 %'),
  absolute_tolerance_ice_per_m3: because(1, 'keeps negative ice below 1e-9 of the water'),
  absolute_tolerance_vapour_per_m3: because(
    1e9,
    'a ten-thousandth of the water at the dry top of the column',
  ),
  sublimation_ceiling_s: because(
    60,
    'no visible effect on the cloud; 240 s is not safe under waves',
  ),
  nucleation_ceiling_s: because(
    60,
    'no visible effect on the cloud; 240 s is not safe under waves',
  ),
  max_steps_per_interval: because(100_000, 'hundreds of times what an ordinary interval needs'),
  break_points_h: because(
    [] as number[],
    'the edges of waves, perturbations and profiles are found by themselves; a comparison of two runs lists here those of both',
  ),
  extrapolation_columns: because(3, 'the fastest order for this system, measured'),
}

export const channelDefaults = {
  list: because(
    [
      { name: '260nm', wavelength_nm: 260, geometry: 'albedo' as const },
      { name: '532nm', wavelength_nm: 532, geometry: 'backscatter' as const },
      { name: '355nm', wavelength_nm: 355, geometry: 'backscatter' as const },
    ],
    'an ultraviolet imager and the two usual lidar wavelengths',
  ),
  scattering_angle_deg: because(90, 'an imager looking down past a low sun'),
  view_zenith_deg: because(0, 'looking straight down'),
}

export const outputDefaults = {
  size_distribution: because('auto' as const, 'written unless it would exceed 200 MB'),
  state_every_h: because(6, 'a run can be continued from any quarter of a day'),
}
