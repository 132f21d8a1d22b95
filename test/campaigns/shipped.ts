import { fileURLToPath } from 'node:url'
import { loadScenario } from '../../src/io/scenario/loadScenario.ts'
import { shippedNames } from '../../src/io/scenario/scenarioLayers.ts'
import { type Column, prepareColumn } from '../../src/model/simulate.ts'

const directory = fileURLToPath(new URL('../../scenarios/', import.meta.url))

export const shippedScenarios = shippedNames(directory)

/**
 * The column of a shipped scenario.
 *
 * @param set overrides of the form path=value
 */
export function shippedColumn(name: string, set: readonly string[] = []): Column {
  const places = { shippedDirectory: directory, workingDirectory: directory }
  return prepareColumn(loadScenario(name, { set, ...places }).scenario)
}
