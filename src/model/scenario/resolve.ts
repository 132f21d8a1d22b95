import { iceRefractiveIndex } from '../optics/iceRefractiveIndex.ts'
import { DEGREE, HOUR, KILOMETRE, NANOMETRE, PER_CUBIC_CENTIMETRE } from '../units.ts'
import { checkScenario } from './checkScenario.ts'
import { complete } from './complete.ts'
import { HALF_MAXIMUM_WIDTH } from './halfMaximumWidth.ts'
import { ScenarioError } from './problems.ts'
import { resolveBackground } from './resolveBackground.ts'
import { resolvePerturbation, resolveWaves } from './resolveForcing.ts'
import { scenarioWarnings } from './scenarioWarnings.ts'
import type { ScenarioDocument } from './schema.ts'
import type {
  Channel,
  IceSpec,
  InitialIce,
  NucleationSpec,
  NumericsSpec,
  SaturationFormula,
  Scenario,
} from './types.ts'

/**
 * A scenario document becomes the SI records of the model: the one place where units change.
 * Throws a ScenarioError for what is impossible; what is merely outside a measured range becomes a warning.
 */
export function resolve(input: unknown): { scenario: Scenario; warnings: string[] } {
  const document = complete(input)
  const problems = checkScenario(document)
  if (problems.length > 0) throw new ScenarioError(problems)
  return { scenario: toScenario(document), warnings: scenarioWarnings(document) }
}

function toScenario(document: ScenarioDocument): Scenario {
  const { grid, sizes, processes } = document
  return {
    title: document.title,
    duration_s: document.duration_h * HOUR,
    outputInterval_s: document.output_every_min * 60,
    startUtc: document.start_utc ?? null,
    grid: {
      bottom_m: grid.bottom_km * KILOMETRE,
      top_m: grid.top_km * KILOMETRE,
      levels: grid.levels,
    },
    sizes: {
      smallest_m: sizes.smallest_nm * NANOMETRE,
      largest_m: sizes.largest_nm * NANOMETRE,
      classes: sizes.classes,
      stretching: sizes.stretching,
    },
    background: resolveBackground(document),
    waves: resolveWaves(document),
    perturbations: document.perturbations.map(resolvePerturbation),
    initialIce: document.initial.ice.map(resolveInitialIce),
    ice: resolveIce(document.ice),
    nucleation: resolveNucleation(document.nucleation),
    processes: { ...processes },
    numerics: resolveNumerics(document.numerics),
    channels: document.channels.map(resolveChannel),
  }
}

function resolveInitialIce(layer: ScenarioDocument['initial']['ice'][number]): InitialIce {
  return {
    altitude_m: layer.altitude_km * KILOMETRE,
    sigma_m: (layer.width_km * KILOMETRE) / HALF_MAXIMUM_WIDTH,
    number_per_m3: layer.number_per_cm3 * PER_CUBIC_CENTIMETRE,
    medianRadius_m: layer.median_radius_nm * NANOMETRE,
    geometricWidth: layer.geometric_width,
  }
}

const saturationFormulas: Record<ScenarioDocument['ice']['saturation'], SaturationFormula> = {
  murphy_koop_2005: 'murphyKoop2005',
  iapws_2011: 'iapws2011',
  marti_mauersberger_1993: 'martiMauersberger1993',
}

function resolveIce(ice: ScenarioDocument['ice']): IceSpec {
  return {
    density: ice.density,
    accommodation: ice.accommodation,
    saturation: saturationFormulas[ice.saturation],
    amorphousOffset: ice.amorphous_offset,
    particleWarming_K: ice.particle_warming_K,
    dragDelta: ice.drag_delta,
    slip: ice.slip === 'davies' ? 'davies' : 'epsteinStokes',
  }
}

function resolveNucleation(nucleation: ScenarioDocument['nucleation']): NucleationSpec {
  return {
    scheme: nucleation.scheme,
    contactParameter: nucleation.contact_parameter,
    desorptionEnergy_J: nucleation.desorption_energy_J,
    surfaceDiffusionEnergy_J: nucleation.surface_diffusion_energy_J,
    vibrationFrequency_per_s: nucleation.vibration_frequency_per_s,
    jumpDistance_m: nucleation.jump_distance_nm * NANOMETRE,
  }
}

function resolveNumerics(numerics: ScenarioDocument['numerics']): NumericsSpec {
  return {
    relativeTolerance: numerics.relative_tolerance,
    absoluteToleranceIce: numerics.absolute_tolerance_ice_per_m3,
    absoluteToleranceVapour: numerics.absolute_tolerance_vapour_per_m3,
    sublimationCeiling_s: numerics.sublimation_ceiling_s,
    nucleationCeiling_s: numerics.nucleation_ceiling_s,
    maxStepsPerInterval: numerics.max_steps_per_interval,
    extrapolationColumns: numerics.extrapolation_columns,
    breakPoints_s: numerics.break_points_h.map((time) => time * HOUR),
  }
}

function resolveChannel(channel: ScenarioDocument['channels'][number]): Channel {
  const wavelength_m = channel.wavelength_nm * NANOMETRE
  const { n, k } = channel.refractive_index ?? iceRefractiveIndex(wavelength_m)
  const { scattering_angle_deg = 0, view_zenith_deg = 0 } = channel
  return {
    name: channel.name,
    wavelength_m,
    refractiveIndex: { n, k },
    geometry:
      channel.geometry === 'backscatter'
        ? { kind: 'backscatter' }
        : {
            kind: 'albedo',
            scatteringAngle_rad: scattering_angle_deg * DEGREE,
            viewZenith_rad: view_zenith_deg * DEGREE,
          },
  }
}
