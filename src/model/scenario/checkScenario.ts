/**
 * Everything that is impossible although each single value is allowed.
 */
import { InputError } from '../errors.ts'
import { iceRefractiveIndex } from '../optics/iceRefractiveIndex.ts'
import { NANOMETRE } from '../units.ts'
import { checkForcing } from './checkForcing.ts'
import { checkProfiles } from './checkProfiles.ts'
import { type Path, problem, type ScenarioProblem } from './problems.ts'
import type { ScenarioDocument } from './schema.ts'

/** Output rows (times by levels) above which a run would drown in its own output. */
const MOST_OUTPUT_ROWS = 50e6

export function checkScenario(document: ScenarioDocument): ScenarioProblem[] {
  return [
    ...checkExtends(document),
    ...checkTimes(document),
    ...checkGrid(document),
    ...checkProfiles(document),
    ...checkForcing(document),
    ...checkParticles(document),
    ...document.channels.flatMap((_, i) => checkChannel(document, i)),
  ]
}

function checkExtends(document: ScenarioDocument): ScenarioProblem[] {
  return document.extends === undefined
    ? []
    : [problem(['extends'], 'is not read yet; the scenario it names has to be merged first')]
}

function checkTimes(document: ScenarioDocument): ScenarioProblem[] {
  const { duration_h, output_every_min, grid } = document
  const duration_min = duration_h * 60
  if (output_every_min > duration_min) {
    return [
      problem(
        ['output_every_min'],
        `${output_every_min} is not allowed; allowed: at most the length of the run, ${duration_min} min`,
      ),
    ]
  }
  const rows = (duration_min / output_every_min) * grid.levels
  if (rows <= MOST_OUTPUT_ROWS) return []
  return [
    problem(
      ['output_every_min'],
      `${output_every_min} makes ${rows.toExponential(1)} output rows (times by levels); allowed: up to ${MOST_OUTPUT_ROWS.toExponential(0)}`,
    ),
  ]
}

function checkGrid({ grid, sizes }: ScenarioDocument): ScenarioProblem[] {
  return [
    ...above(['grid', 'top_km'], grid.top_km, 'bottom_km', grid.bottom_km),
    ...above(['sizes', 'largest_nm'], sizes.largest_nm, 'smallest_nm', sizes.smallest_nm),
  ]
}

function above(path: Path, value: number, lowerKey: string, lower: number): ScenarioProblem[] {
  return value > lower
    ? []
    : [problem(path, `${value} is not allowed; allowed: above ${lowerKey} ${lower}`)]
}

function checkParticles({ nuclei, sizes, initial }: ScenarioDocument): ScenarioProblem[] {
  const { smallest_nm, largest_nm } = sizes
  const allowed = `allowed: inside the radius classes, ${smallest_nm} to ${largest_nm} nm`
  const outside = (radius: number) => radius < smallest_nm || radius > largest_nm
  return [
    ...nuclei.classes.flatMap(({ radius_nm }, i) =>
      outside(radius_nm)
        ? [
            problem(
              ['nuclei', 'classes', i, 'radius_nm'],
              `${radius_nm} is not allowed; ${allowed}`,
            ),
          ]
        : [],
    ),
    ...initial.ice.flatMap(({ median_radius_nm }, i) =>
      outside(median_radius_nm)
        ? [
            problem(
              ['initial', 'ice', i, 'median_radius_nm'],
              `${median_radius_nm} is not allowed; ${allowed}`,
            ),
          ]
        : [],
    ),
  ]
}

function checkChannel({ channels }: ScenarioDocument, index: number): ScenarioProblem[] {
  const { name, geometry, wavelength_nm, refractive_index } = channels[index]
  const path = ['channels', index] as const
  if (channels.findIndex((other) => other.name === name) < index) {
    return [problem([...path, 'name'], `${name} is taken; allowed: a name of its own per channel`)]
  }
  const angle = (['scattering_angle_deg', 'view_zenith_deg'] as const).find(
    (key) => geometry === 'backscatter' && channels[index][key] !== undefined,
  )
  if (angle !== undefined) {
    return [problem([...path, angle], 'has no meaning for backscatter; allowed: for an albedo')]
  }
  return refractive_index === undefined ? checkWavelength([...path], wavelength_nm) : []
}

function checkWavelength(path: Path, wavelength_nm: number): ScenarioProblem[] {
  try {
    iceRefractiveIndex(wavelength_nm * NANOMETRE)
    return []
  } catch (error) {
    if (!(error instanceof InputError)) throw error
    return [
      problem(
        [...path, 'wavelength_nm'],
        `${wavelength_nm} is not allowed without a refractive_index; ${error.message}`,
      ),
    ]
  }
}
