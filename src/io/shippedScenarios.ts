import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { parse } from 'yaml'
import { InputError } from '../model/errors.ts'
import { nearestWord } from '../model/scenario/nearestWord.ts'
import { shippedNames } from './scenario/scenarioLayers.ts'

export interface ShippedScenario {
  name: string
  title: string
  /** The question that the scenario answers. */
  question: string
}

const ENDING = '.yaml'

export function listShippedScenarios(directory: string): ShippedScenario[] {
  return shippedNames(directory).map((name) => {
    const { title = name, question = '' } = parse(
      readFileSync(join(directory, `${name}${ENDING}`), 'utf8'),
    )
    return { name, title, question: String(question).trim().replace(/\s+/g, ' ') }
  })
}

/** The text of a shipped scenario. */
export function readShippedScenario(directory: string, name: string): string {
  const names = shippedNames(directory)
  if (names.includes(name)) return readFileSync(join(directory, `${name}${ENDING}`), 'utf8')
  const nearest = nearestWord(name, names)
  const hint = nearest === null ? `there are ${names.join(', ')}` : `did you mean ${nearest}?`
  throw new InputError(`no scenario '${name}' is shipped; ${hint}`)
}
