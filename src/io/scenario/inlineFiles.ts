import { resolve } from 'node:path'
import { InputError } from '../../model/errors.ts'
import {
  altitudeUnits,
  type ProfileName,
  type ProfileQuantity,
  profileQuantities,
  timeUnits,
} from '../../model/scenario/profileQuantities.ts'
import type { ScenarioDocument } from '../../model/scenario/schema.ts'
import { csvColumns } from './csvColumns.ts'
import {
  type Place,
  type PlacedMapping,
  type PlacedValue,
  placedAt,
  placeOf,
  placeText,
} from './placedValue.ts'
import { readTextFile } from './readTextFile.ts'

interface ColumnRequest {
  column: string
  unit: string
}

/** A number with the place that it was read from. */
interface PlacedNumber {
  value: number
  place: Place
}

type ProfileFile = NonNullable<ScenarioDocument[ProfileName]['file']>
type Measured = NonNullable<ScenarioDocument['temperature']['measured']>
type MeasuredFile = NonNullable<Measured['file']>

/** The scenario with the tables of all files written in, each number placed in its file. */
export function inlineFiles(scenario: PlacedMapping, document: ScenarioDocument): PlacedMapping {
  let inlined = scenario
  for (const name of Object.keys(profileQuantities) as ProfileName[]) {
    const { file } = document[name]
    if (file === undefined) continue
    const place = placeOf(scenario, [name, 'file', 'path'], 'value')
    inlined = replaceFile(inlined, [name], { table: profileTable(file, name, place) })
  }
  const measured = document.temperature.measured?.file
  if (measured === undefined) return inlined
  const path = ['temperature', 'measured']
  const place = placeOf(scenario, [...path, 'file', 'path'], 'value')
  return replaceFile(inlined, path, measuredTable(measured, place))
}

function profileTable({ path, altitude, value }: ProfileFile, name: ProfileName, place: Place) {
  const { key, fileUnits }: ProfileQuantity = profileQuantities[name]
  const [altitudes, values] = readColumns(path, place, [
    { ...altitude, factor: altitudeUnits[altitude.unit] },
    { ...value, factor: fileUnits[value.unit] },
  ])
  return mapping(place, { altitude_km: listOf(altitudes, place), [key]: listOf(values, place) })
}

function readColumns(
  path: string,
  place: Place,
  requests: (ColumnRequest & { factor: number })[],
): PlacedNumber[][] {
  const file = resolve(place.directory, path)
  const text = textOf(file, path, place)
  const { columns, lines } = csvColumns(
    text,
    path,
    requests.map(({ column }) => column),
  )
  return columns.map((numbers, i) =>
    numbers.map((number, row) => ({
      // Twelve digits: 83.1 km written as 83100 m is 83.1 again.
      value: Number((number * requests[i].factor).toPrecision(12)),
      place: { ...place, source: path, line: lines[row], column: 1 },
    })),
  )
}

function textOf(file: string, path: string, place: Place): string {
  try {
    return readTextFile(file, path, 'file')
  } catch (error) {
    if (!(error instanceof InputError)) throw error
    throw new InputError(`${placeText(place)}: ${error.message}`)
  }
}

/** Rows of time, altitude and temperature become a table; every time needs every altitude. */
function measuredTable(
  { path, time, altitude, temperature }: MeasuredFile,
  place: Place,
): Record<string, PlacedValue> {
  const [times, altitudes, temperatures] = readColumns(path, place, [
    { ...time, factor: timeUnits[time.unit] },
    { ...altitude, factor: altitudeUnits[altitude.unit] },
    { ...temperature, factor: 1 },
  ])
  const cells = new Map<string, PlacedNumber>()
  for (const [row, cell] of temperatures.entries()) {
    const key = cellKey(times[row], altitudes[row])
    if (cells.has(key)) throw new InputError(`${placeText(cell.place)}: ${key} stands there twice`)
    cells.set(key, cell)
  }
  const [timeAxis, altitudeAxis] = [axisOf(times), axisOf(altitudes)]
  const rowAt = (instant: PlacedNumber) =>
    altitudeAxis.map((level) => {
      const key = cellKey(instant, level)
      const cell = cells.get(key)
      if (cell !== undefined) return cell
      throw new InputError(
        `${path}: no temperature at ${key}; allowed: every altitude at every time`,
      )
    })
  const rows = timeAxis.map((instant) => listOf(rowAt(instant), place))
  return {
    time_h: listOf(timeAxis, place),
    altitude_km: listOf(altitudeAxis, place),
    temperature_K: { kind: 'list', place, items: rows },
  }
}

function cellKey(time_h: PlacedNumber, altitude_km: PlacedNumber): string {
  return `${time_h.value} h, ${altitude_km.value} km`
}

/** The different values of a column, in increasing order. */
function axisOf(numbers: PlacedNumber[]): PlacedNumber[] {
  const first = new Map(numbers.toReversed().map((number) => [number.value, number]))
  return [...first.values()].sort((a, b) => a.value - b.value)
}

function listOf(numbers: PlacedNumber[], place: Place): PlacedValue {
  return { kind: 'list', place, items: numbers.map(({ value, place }) => placedAt(value, place)) }
}

function mapping(place: Place, values: Record<string, PlacedValue>): PlacedMapping {
  const entries = Object.entries(values).map(
    ([key, value]) => [key, { keyPlace: place, value }] as const,
  )
  return { kind: 'mapping', place, entries: new Map(entries) }
}

/** Puts the content of a file in the place of the key `file`. */
function replaceFile(
  target: PlacedMapping,
  [key, ...rest]: readonly string[],
  content: Record<string, PlacedValue>,
): PlacedMapping {
  const entries = new Map(target.entries)
  if (key === undefined) {
    const place = entries.get('file')?.keyPlace ?? target.place
    entries.delete('file')
    for (const [name, value] of Object.entries(content)) {
      entries.set(name, { keyPlace: place, value })
    }
    return { ...target, entries }
  }
  const entry = entries.get(key)
  if (entry?.value.kind === 'mapping') {
    entries.set(key, { ...entry, value: replaceFile(entry.value, rest, content) })
  }
  return { ...target, entries }
}
