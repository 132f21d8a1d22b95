import { existsSync } from 'node:fs'
import { basename, dirname, extname, join, resolve } from 'node:path'
import { InputError } from '../../model/errors.ts'
import { parseStudy, type Study } from '../../model/experiments/study.ts'
import { nearestWord } from '../../model/scenario/nearestWord.ts'
import { type LoadedScenario, loadScenario, withPlaces } from '../scenario/loadScenario.ts'
import { parsePlacedYaml } from '../scenario/parsePlacedYaml.ts'
import { plain } from '../scenario/placedValue.ts'
import { readTextFile } from '../scenario/readTextFile.ts'
import { shippedNames } from '../scenario/scenarioLayers.ts'

export interface LoadedStudy {
  /** The file without its ending; names directories. */
  name: string
  study: Study
  base: LoadedScenario
}

export interface StudyRequest {
  /** Overrides of the scenario that the study starts from, path=value. */
  set: readonly string[]
  /** Where the shipped scenarios lie, with the shipped studies below. */
  scenarioDirectory: string
  workingDirectory: string
}

/** Directory of the shipped studies. */
export function shippedStudies(scenarioDirectory: string): string {
  return join(scenarioDirectory, 'studies')
}

/** A path when it looks like one, else the name of a shipped study, else again a path. */
function findStudy(pathOrName: string, request: StudyRequest): string {
  const path = resolve(request.workingDirectory, pathOrName)
  if (!/^[\w-]+$/.test(pathOrName)) return path
  const directory = shippedStudies(request.scenarioDirectory)
  const names = shippedNames(directory)
  if (names.includes(pathOrName)) return join(directory, `${pathOrName}.yaml`)
  if (existsSync(path)) return path
  const nearest = nearestWord(pathOrName, names)
  const hint = nearest === null ? '' : `; did you mean ${nearest}?`
  throw new InputError(
    `no file and no shipped study is called ${pathOrName}; shipped: ${names.join(', ') || 'none'}${hint}`,
  )
}

/** Reads a study and the scenario that it starts from. */
export function loadStudy(pathOrName: string, request: StudyRequest): LoadedStudy {
  const path = findStudy(pathOrName, request)
  const text = readTextFile(path, pathOrName, 'study')
  const origin = { source: pathOrName, directory: dirname(path), line: 1, column: 1 }
  const placed = parsePlacedYaml(text, origin)
  if (placed.kind !== 'mapping')
    throw new InputError(
      `study ${pathOrName} is not a mapping; allowed: lines of the form key: value`,
    )
  const study = withPlaces(placed, () => parseStudy(plain(placed)))
  const base = loadScenario(study.base, {
    set: request.set,
    shippedDirectory: request.scenarioDirectory,
    workingDirectory: dirname(path),
  })
  return { name: basename(path, extname(path)), study, base }
}
