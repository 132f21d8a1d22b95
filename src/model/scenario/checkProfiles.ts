/**
 * Checks of the profiles that need more than one value: increasing altitudes and times, the whole column covered.
 */
import { type Path, problem, type ScenarioProblem } from './problems.ts'
import { type ProfileColumn, profileColumns } from './profileColumns.ts'
import { type ProfileName, profileQuantities } from './profileQuantities.ts'
import type { ScenarioDocument } from './schema.ts'

export function checkProfiles(document: ScenarioDocument): ScenarioProblem[] {
  const names = Object.keys(profileQuantities) as ProfileName[]
  return [
    ...names.flatMap((name) => checkProfile(document, name)),
    ...checkTemperature(document),
    ...checkWaterHandles(document),
    ...checkMeasured(document),
  ]
}

function checkProfile(document: ScenarioDocument, name: ProfileName): ScenarioProblem[] {
  if (document[name].file !== undefined) return [notInlined([name, 'file'])]
  const columns = profileColumns(document, name)
  const shapes = columns.flatMap((column) => checkShape(column, document.grid))
  return shapes.length > 0 ? shapes : checkSeries(name, columns)
}

function notInlined(path: Path): ScenarioProblem {
  return problem(path, 'is not read yet; a file has to be inlined first')
}

function checkShape(column: ProfileColumn, grid: ScenarioDocument['grid']): ScenarioProblem[] {
  const { altitudes_km, values, path } = column
  if (altitudes_km.length !== values.length) {
    return [
      problem(
        path,
        `has ${altitudes_km.length} altitudes but ${values.length} values; allowed: as many of one as of the other`,
      ),
    ]
  }
  const wrong = notIncreasing(altitudes_km)
  if (wrong !== null) {
    return [problem(column.altitudePath(wrong), orderText(altitudes_km, wrong, 'altitudes'))]
  }
  return checkCover(path, altitudes_km, grid)
}

function checkCover(
  path: Path,
  altitudes_km: number[],
  { bottom_km, top_km }: ScenarioDocument['grid'],
): ScenarioProblem[] {
  const [lowest, highest] = [altitudes_km[0], altitudes_km[altitudes_km.length - 1]]
  if (lowest <= bottom_km && highest >= top_km) return []
  return [
    problem(
      path,
      `covers ${lowest} to ${highest} km; allowed: a profile that covers the grid, ${bottom_km} to ${top_km} km`,
    ),
  ]
}

function checkSeries(name: ProfileName, columns: ProfileColumn[]): ScenarioProblem[] {
  const times = columns.map(({ time_h }) => time_h)
  const wrong = notIncreasing(times)
  if (wrong !== null) {
    return [problem([name, 'series', wrong, 'time_h'], orderText(times, wrong, 'times'))]
  }
  return columns
    .filter(({ altitudes_km }) => !equal(altitudes_km, columns[0].altitudes_km))
    .map(({ path }) => problem(path, 'has other altitudes than the first time; allowed: the same'))
}

function checkTemperature(document: ScenarioDocument): ScenarioProblem[] {
  const { offset_K } = document.temperature
  const columns = profileColumns(document, 'temperature')
  const coldest = Math.min(...columns.flatMap(({ values }) => values))
  const problems: ScenarioProblem[] = []
  if (coldest + offset_K <= 0) {
    problems.push(
      problem(
        ['temperature', 'offset_K'],
        `${offset_K} brings the coldest ${coldest} K down to ${coldest + offset_K} K; allowed: temperatures above 0 K`,
      ),
    )
  }
  const reference = document.pressure.altitude_km
  const altitudes = columns[0]?.altitudes_km ?? [reference]
  const [lowest, highest] = [altitudes[0], altitudes[altitudes.length - 1]]
  if (reference < lowest || reference > highest) {
    problems.push(
      problem(
        ['pressure', 'altitude_km'],
        `${reference} is not allowed; allowed: an altitude inside the temperature profile, ${lowest} to ${highest} km`,
      ),
    )
  }
  return problems
}

function checkWaterHandles(document: ScenarioDocument): ScenarioProblem[] {
  const { at_83km_ppmv, factor } = document.water
  if (at_83km_ppmv === undefined) return []
  const path = ['water', 'at_83km_ppmv']
  if (factor !== 1) {
    return [problem(path, `stands beside factor ${factor}; allowed: one of them`)]
  }
  const altitudes = profileColumns(document, 'water')[0]?.altitudes_km ?? [83]
  const covered = altitudes[0] <= 83 && altitudes[altitudes.length - 1] >= 83
  return covered ? [] : [problem(path, 'needs a water profile that covers 83 km')]
}

function checkMeasured({ temperature: { measured } }: ScenarioDocument): ScenarioProblem[] {
  if (measured === undefined) return []
  const path = ['temperature', 'measured']
  const { time_h = [], altitude_km = [], temperature_K = [], file } = measured
  if (file !== undefined) return [notInlined([...path, 'file'])]
  for (const [key, axis] of Object.entries({ time_h, altitude_km })) {
    const wrong = notIncreasing(axis)
    if (wrong !== null) {
      const what = key === 'time_h' ? 'times' : 'altitudes'
      return [problem([...path, key, wrong], orderText(axis, wrong, what))]
    }
  }
  const rows = temperature_K.length
  if (rows !== time_h.length) {
    const message = `has ${rows} lists; allowed: one per time, ${time_h.length}`
    return [problem([...path, 'temperature_K'], message)]
  }
  const ragged = temperature_K.findIndex((row) => row.length !== altitude_km.length)
  if (ragged < 0) return []
  const message = `has ${temperature_K[ragged].length} values; allowed: one per altitude, ${altitude_km.length}`
  return [problem([...path, 'temperature_K', ragged], message)]
}

/** Index of the first value that is not above the one before; null when all are. */
export function notIncreasing(values: readonly number[]): number | null {
  const index = values.findIndex((value, i) => i > 0 && !(value > values[i - 1]))
  return index < 0 ? null : index
}

function orderText(values: readonly number[], index: number, what: string): string {
  return `${values[index]} after ${values[index - 1]} is not allowed; allowed: increasing ${what}`
}

function equal(a: readonly number[], b: readonly number[]): boolean {
  return a.length === b.length && a.every((value, i) => value === b[i])
}
