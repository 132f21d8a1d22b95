import { excludedBy } from '../scenario/alternatives.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'

/** A value that one key of a scenario can hold. */
export type KeyValue = number | string | boolean

/**
 * The document with one key set; what the key excludes is dropped, such as a factor beside a value at 83 km. All that
 * is not on the path is shared with the original. The result still has to be completed and checked.
 *
 * @param key dotted path, such as 'waves.0.amplitude_K'
 */
export function setKey(document: ScenarioDocument, key: string, value: KeyValue): ScenarioDocument {
  return setIn(document, key.split('.'), 0, value) as ScenarioDocument
}

function setIn(target: unknown, path: readonly string[], depth: number, value: KeyValue): unknown {
  if (depth === path.length) return value
  const step = path[depth]
  if (Array.isArray(target)) {
    return target.with(Number(step), setIn(target[Number(step)], path, depth + 1, value))
  }
  const section = { ...(target as Record<string, unknown> | undefined) }
  for (const excluded of excludedBy(path.slice(0, depth).join('.'), step)) delete section[excluded]
  return { ...section, [step]: setIn(section[step], path, depth + 1, value) }
}
