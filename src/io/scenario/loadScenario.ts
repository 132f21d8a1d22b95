import { InputError } from '../../model/errors.ts'
import { complete } from '../../model/scenario/complete.ts'
import { problemText, ScenarioError } from '../../model/scenario/problems.ts'
import { resolve } from '../../model/scenario/resolve.ts'
import type { ScenarioDocument } from '../../model/scenario/schema.ts'
import type { Scenario } from '../../model/scenario/types.ts'
import { validate } from '../../model/scenario/validate.ts'
import { inlineFiles } from './inlineFiles.ts'
import { override } from './override.ts'
import { type PlacedValue, placeOf, placeText, plain } from './placedValue.ts'
import { findScenario, readLayers } from './scenarioLayers.ts'

export interface LoadedScenario {
  /** Complete: defaults filled in, files inlined, extended scenarios merged, overrides applied. */
  document: ScenarioDocument
  scenario: Scenario
  warnings: string[]
  title: string
  /** Absolute path of the scenario file. */
  sourcePath: string
}

export interface ScenarioRequest {
  /** Overrides of the form path=value. */
  set: readonly string[]
  /** Where the scenarios lie that are called by their bare names. */
  shippedDirectory: string
  /** What relative paths are relative to. */
  workingDirectory: string
}

/** Reads a scenario from a YAML or JSON file, a run.json, or by the name of a shipped one. */
export function loadScenario(pathOrName: string, request: ScenarioRequest): LoadedScenario {
  const { set, shippedDirectory, workingDirectory } = request
  const source = findScenario(pathOrName, workingDirectory, shippedDirectory)
  const layers = readLayers(source, shippedDirectory)
  const placed = set.reduce(
    (scenario, setting) => override(scenario, setting, workingDirectory),
    layers,
  )
  const checked = withPlaces(placed, () => validate(plain(placed)))
  const inlined = inlineFiles(placed, checked)
  return withPlaces(inlined, () => {
    const document = complete(plain(inlined))
    const { scenario, warnings } = resolve(document)
    return { document, scenario, warnings, title: document.title, sourcePath: source.path }
  })
}

/** Adds file, line and column to what the model has against a scenario or a study. */
export function withPlaces<T>(placed: PlacedValue, judge: () => T): T {
  try {
    return judge()
  } catch (error) {
    if (!(error instanceof ScenarioError)) throw error
    const lines = error.problems.map(({ path, at, message }) => {
      const where = placeText(placeOf(placed, path, at))
      return path.length === 0 ? `${where}: ${message}` : `${where}: ${path.join('.')}: ${message}`
    })
    throw new InputError(problemText(lines))
  }
}
