/**
 * Finds and reads a scenario and all that it extends, and lays them over each other.
 */
import { existsSync, readdirSync } from 'node:fs'
import { basename, dirname, extname, join, resolve } from 'node:path'
import { InputError } from '../../model/errors.ts'
import { nearestWord } from '../../model/scenario/nearestWord.ts'
import { RUN_FORMAT } from '../runRecord.ts'
import { mergePlaced } from './mergePlaced.ts'
import { parsePlacedYaml } from './parsePlacedYaml.ts'
import { type PlacedMapping, placeText, plain } from './placedValue.ts'
import { readTextFile } from './readTextFile.ts'

export interface ScenarioSource {
  /** Absolute path. */
  path: string
  /** How the user called it; messages use this. */
  name: string
}

const EXTENSION = '.yaml'

/** The names of the scenarios in a directory of shipped ones. */
export function shippedNames(shippedDirectory: string): string[] {
  if (!existsSync(shippedDirectory)) return []
  return readdirSync(shippedDirectory)
    .filter((file) => extname(file) === EXTENSION)
    .map((file) => basename(file, EXTENSION))
    .sort()
}

/** A path when it looks like one, else the name of a shipped scenario, else again a path. */
export function findScenario(
  pathOrName: string,
  directory: string,
  shippedDirectory: string,
): ScenarioSource {
  const path = resolve(directory, pathOrName)
  const isBare = /^[\w-]+$/.test(pathOrName)
  if (!isBare) return { path, name: pathOrName }
  const names = shippedNames(shippedDirectory)
  if (names.includes(pathOrName)) {
    return { path: join(shippedDirectory, pathOrName + EXTENSION), name: pathOrName + EXTENSION }
  }
  if (existsSync(path)) return { path, name: pathOrName }
  const nearest = nearestWord(pathOrName, names)
  const hint = nearest === null ? '' : `; did you mean ${nearest}?`
  throw new InputError(
    `no file and no shipped scenario is called ${pathOrName}; shipped: ${names.join(', ') || 'none'}${hint}`,
  )
}

/** The scenario with everything that it extends beneath it. */
export function readLayers(
  source: ScenarioSource,
  shippedDirectory: string,
  chain: readonly ScenarioSource[] = [],
): PlacedMapping {
  const loop = [...chain, source]
  if (chain.some(({ path }) => path === source.path)) {
    throw new InputError(`${chain[0].name} extends itself: ${loop.map(nameOf).join(' -> ')}`)
  }
  const own = readScenarioFile(source)
  const parent = own.entries.get('extends')
  if (parent === undefined) return own
  const name = plain(parent.value)
  // Anything but a name is left for the schema to refuse.
  if (typeof name !== 'string' || name === '') return own
  const entries = new Map(own.entries)
  entries.delete('extends')
  const below = readLayers(
    placedSource(name, placeText(parent.value.place), { source, shippedDirectory }),
    shippedDirectory,
    loop,
  )
  return mergePlaced(below, { ...own, entries })
}

function placedSource(
  name: string,
  where: string,
  { source, shippedDirectory }: { source: ScenarioSource; shippedDirectory: string },
): ScenarioSource {
  try {
    const found = findScenario(name, dirname(source.path), shippedDirectory)
    if (!existsSync(found.path)) throw new InputError(`scenario ${name} does not exist`)
    return found
  } catch (error) {
    if (!(error instanceof InputError)) throw error
    throw new InputError(`${where}: extends: ${error.message}`)
  }
}

function nameOf({ name }: ScenarioSource): string {
  return name
}

function readScenarioFile({ path, name }: ScenarioSource): PlacedMapping {
  const text = readTextFile(path, name, 'scenario')
  const origin = { source: name, directory: dirname(path), line: 1, column: 1 }
  const placed = parsePlacedYaml(text, origin)
  if (placed.kind === 'scalar' && placed.value === null) {
    throw new InputError(`scenario ${name} is empty`)
  }
  if (placed.kind !== 'mapping') {
    throw new InputError(`scenario ${name} is not a mapping; allowed: lines of the form key: value`)
  }
  const format = placed.entries.get('format')
  if (format === undefined || plain(format.value) !== RUN_FORMAT) return placed
  const scenario = placed.entries.get('scenario')
  if (scenario?.value.kind !== 'mapping') {
    throw new InputError(`run record ${name} holds no scenario`)
  }
  return scenario.value
}
