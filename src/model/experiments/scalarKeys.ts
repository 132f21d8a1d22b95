import { InputError } from '../errors.ts'
import { nearestWord } from '../scenario/nearestWord.ts'
import { type ScenarioDocument, scenarioJsonSchema } from '../scenario/schema.ts'

/** The parts of JSON Schema that tell what a key holds. */
interface SchemaNode {
  type?: string
  enum?: string[]
  properties?: Record<string, SchemaNode>
  items?: SchemaNode
}

/** A number, or a word or switch. */
export type KeyKind = 'number' | 'text'

/**
 * Every key of a scenario that holds one number, word or switch, by its dotted path; items of lists as far as the
 * document has them.
 */
export function scalarKeys(document: ScenarioDocument): Map<string, KeyKind> {
  const keys = new Map<string, KeyKind>()
  collect(scenarioJsonSchema(), [], document, keys)
  return keys
}

function collect(
  node: SchemaNode,
  path: readonly string[],
  value: unknown,
  keys: Map<string, KeyKind>,
): void {
  const kind = kindOf(node)
  if (kind !== null) keys.set(path.join('.'), kind)
  for (const [key, child] of Object.entries(node.properties ?? {})) {
    collect(child, [...path, key], (value as Record<string, unknown> | undefined)?.[key], keys)
  }
  if (node.items === undefined || !Array.isArray(value)) return
  for (const [index, item] of value.entries()) {
    collect(node.items, [...path, String(index)], item, keys)
  }
}

function kindOf(node: SchemaNode): KeyKind | null {
  if (node.type === 'number' || node.type === 'integer') return 'number'
  return node.enum !== undefined || node.type === 'boolean' ? 'text' : null
}

/** The kind of a key that a study may vary. Throws an InputError that names the nearest one, or the missing item. */
export function keyKind(document: ScenarioDocument, key: string): KeyKind {
  const keys = scalarKeys(document)
  const kind = keys.get(key)
  if (kind !== undefined) return kind
  const nearest = nearestWord(key, [...keys.keys()])
  const hint = nearest === null ? '' : `; did you mean ${nearest}?`
  throw new InputError(`${key} is no key that can be varied${missingItem(document, key)}${hint}`)
}

/** For a path into a list that is shorter: which list, and what it holds. */
function missingItem(document: ScenarioDocument, key: string): string {
  let value: unknown = document
  const steps = key.split('.')
  for (const [depth, step] of steps.entries()) {
    if (Array.isArray(value) && /^\d+$/.test(step) && value[Number(step)] === undefined) {
      const owner = steps.slice(0, depth).join('.')
      return `: ${owner} of the base scenario has ${value.length === 0 ? 'no items' : `items 0 to ${value.length - 1}`}`
    }
    value = (value as Record<string, unknown> | undefined)?.[step]
  }
  return ''
}
