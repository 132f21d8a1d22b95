/**
 * Values that are possible but lie outside the range in which a formula was measured, or that do nothing.
 */
import { profileColumns } from './profileColumns.ts'
import type { ScenarioDocument } from './schema.ts'

export function scenarioWarnings(document: ScenarioDocument): string[] {
  return [
    ...temperatureWarnings(document),
    ...particleWarnings(document),
    ...gridWarnings(document),
    ...idleWarnings(document),
    ...ceilingWarnings(document),
  ]
}

/** Temperatures for which each saturation formula was made, K. */
const saturationRanges = {
  // Murphy and Koop 2005, eq. 7: above 110 K (read in public copies).
  murphy_koop_2005: [110, 273.16],
  // IAPWS R14-08: 50 to 273.16 K.
  iapws_2011: [50, 273.16],
  // Marti and Mauersberger 1993: measured at about 170 to 250 K, from memory.
  marti_mauersberger_1993: [170, 250],
} as const

/** Temperatures of the undisturbed air and of a measured table inside the column, K. */
function temperaturesInside(document: ScenarioDocument): number[] {
  const { offset_K, measured } = document.temperature
  const { bottom_km, top_km } = document.grid
  const inside = (altitude_km: number) => altitude_km >= bottom_km && altitude_km <= top_km
  const background = profileColumns(document, 'temperature').flatMap(({ altitudes_km, values }) =>
    values.filter((_, row) => inside(altitudes_km[row])).map((value) => value + offset_K),
  )
  const altitudes = measured?.altitude_km ?? []
  const table = measured?.temperature_K?.flatMap((row) =>
    row.filter((_, level) => inside(altitudes[level])),
  )
  return [...background, ...(table ?? [])]
}

function temperatureWarnings(document: ScenarioDocument): string[] {
  const { saturation } = document.ice
  const [least, greatest] = saturationRanges[saturation]
  const temperatures = temperaturesInside(document)
  const coldest = temperatures.reduce((a, b) => Math.min(a, b), Infinity)
  const warmest = temperatures.reduce((a, b) => Math.max(a, b), -Infinity)
  return [coldest < least ? coldest : [], warmest > greatest ? warmest : []]
    .flat()
    .map(
      (worst) =>
        `temperature: ${worst} K is outside ${least} to ${greatest} K, the range of ice.saturation ${saturation}`,
    )
}

function particleWarnings({ nucleation, ice }: ScenarioDocument): string[] {
  const warnings: string[] = []
  const { scheme, contact_parameter } = nucleation
  // Measured on dusts at 158 to 185 K (Iraci et al. 2010, abstract read).
  if (scheme === 'classical' && (contact_parameter < 0.84 || contact_parameter > 0.98)) {
    warnings.push(
      `nucleation.contact_parameter: ${contact_parameter} is outside 0.84 to 0.98, the range measured on dusts`,
    )
  }
  // IAPWS R10-06: 933 kg/m3 at 100 K to 917 kg/m3 at 273 K.
  if (ice.density < 916 || ice.density > 934) {
    warnings.push(
      `ice.density: ${ice.density} kg/m3 is outside 916 to 934, that of hexagonal ice from 100 to 273 K`,
    )
  }
  if (ice.drag_delta < 1 || ice.drag_delta > 1.45) {
    warnings.push(
      `ice.drag_delta: ${ice.drag_delta} is outside 1 to 1.45, from specular to diffuse reflection`,
    )
  }
  return warnings
}

function gridWarnings({ grid }: ScenarioDocument): string[] {
  return grid.bottom_km < 60 || grid.top_km > 105
    ? [
        `grid: ${grid.bottom_km} to ${grid.top_km} km reaches outside 60 to 105 km, where the composition of the air is not that of the ground or drag is not free-molecular`,
      ]
    : []
}

/** Classes for which the default ceilings have been tested, and the ceiling there, s. */
const TESTED = { classes: 96, ceiling_s: 60 }

/** The ceiling counts classes: finer classes shrink slower by it. */
function ceilingWarnings({ sizes, numerics }: ScenarioDocument): string[] {
  const least_s = (numerics.sublimation_ceiling_s * sizes.classes) / TESTED.classes
  return least_s > TESTED.ceiling_s
    ? [
        `numerics.sublimation_ceiling_s: ${numerics.sublimation_ceiling_s} s for one of ${sizes.classes} classes may hold back sublimation; ${Math.floor((TESTED.ceiling_s * TESTED.classes) / sizes.classes)} s or less is tested`,
      ]
    : []
}

/** Buoyancy period near the summer mesopause, 2 pi/N with N about 0.02 1/s, h. */
const BUOYANCY_PERIOD_H = 0.09

function idleWarnings({
  waves,
  random_waves,
  perturbations,
  duration_h,
}: ScenarioDocument): string[] {
  const late = (path: string, start_h: number | undefined) =>
    start_h !== undefined && start_h >= duration_h
      ? [`${path}: starts at ${start_h} h, after the end of the run`]
      : []
  const fast = waves.flatMap(({ period_h, displacement_share }, i) =>
    period_h < BUOYANCY_PERIOD_H && displacement_share > 0
      ? [`waves.${i}.period_h: ${period_h} h is below the buoyancy period of about 0.09 h`]
      : [],
  )
  return [
    ...fast,
    ...waves.flatMap(({ start_h }, i) => late(`waves.${i}`, start_h)),
    ...late('random_waves', random_waves?.start_h),
    ...perturbations.flatMap(({ time }, i) => late(`perturbations.${i}`, time.start_h)),
  ]
}
