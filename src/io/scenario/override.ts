import { InputError } from '../../model/errors.ts'
import { excludedBy } from '../../model/scenario/alternatives.ts'
import { complete } from '../../model/scenario/complete.ts'
import { parsePlacedYaml } from './parsePlacedYaml.ts'
import { type Place, type PlacedMapping, type PlacedValue, placedAt, plain } from './placedValue.ts'

const EXPECTED = 'expected path=value, such as --set duration_h=6 or --set waves.0.amplitude_K=5'

interface Override {
  path: string[]
  value: PlacedValue
  place: Place
}

/**
 * The scenario with one `--set path=value` applied; the value is read as YAML. Steps into a list that the scenario
 * leaves at its default start from that default.
 */
export function override(
  scenario: PlacedMapping,
  setting: string,
  workingDirectory: string,
): PlacedMapping {
  const change = parseOverride(setting, workingDirectory)
  return setIn(scenario, change, 0) as PlacedMapping
}

function parseOverride(setting: string, directory: string): Override {
  const source = `--set ${setting}`
  const cut = setting.indexOf('=')
  const path = setting.slice(0, Math.max(cut, 0)).trim().split('.')
  const text = setting.slice(cut + 1)
  if (cut < 1 || path.some((step) => step === '')) throw new InputError(`${source}: ${EXPECTED}`)
  if (text.trim() === '') throw new InputError(`${source}: no value; ${EXPECTED}`)
  const place = { source, directory, line: null, column: null }
  return { path, value: parsePlacedYaml(text, place), place }
}

function setIn(target: PlacedValue | undefined, change: Override, depth: number): PlacedValue {
  if (depth === change.path.length) return change.value
  if (target === undefined) return setInDefault(change, depth)
  if (target.kind === 'mapping') return setInMapping(target, change, depth)
  if (target.kind === 'list') return setInList(target, change, depth)
  const owner = change.path.slice(0, depth).join('.')
  throw new InputError(
    `${change.place.source}: ${owner} is ${JSON.stringify(target.value)}, which has no keys`,
  )
}

function setInMapping(target: PlacedMapping, change: Override, depth: number): PlacedValue {
  const key = change.path[depth]
  const section = change.path.slice(0, depth).join('.')
  const entries = new Map(target.entries)
  for (const excluded of excludedBy(section, key)) {
    const isTaken = entries.delete(excluded)
    if (isTaken && isIndex(change.path[depth + 1])) {
      throw new InputError(`${change.place.source}: ${section} uses ${excluded}, not ${key}`)
    }
  }
  const isLast = depth === change.path.length - 1
  if (isLast && plain(change.value) === null) entries.delete(key)
  else {
    const value = setIn(entries.get(key)?.value, change, depth + 1)
    entries.set(key, { keyPlace: change.place, value })
  }
  return { ...target, entries }
}

function setInList(
  target: Extract<PlacedValue, { kind: 'list' }>,
  change: Override,
  depth: number,
): PlacedValue {
  const step = change.path[depth]
  const index = isIndex(step) ? Number(step) : -1
  if (target.items[index] === undefined) {
    const owner = change.path.slice(0, depth).join('.')
    const allowed = target.items.length === 0 ? 'none' : `0 to ${target.items.length - 1}`
    throw new InputError(
      `${change.place.source}: ${owner} has no item ${step}; allowed: ${allowed} (a list can be set as a whole)`,
    )
  }
  const items = target.items.map((item, i) => (i === index ? setIn(item, change, depth + 1) : item))
  return { ...target, items }
}

/** Sets inside a value that the scenario does not give: a default list, or a mapping yet to be made. */
function setInDefault(change: Override, depth: number): PlacedValue {
  const { path, place } = change
  if (isIndex(path[depth])) {
    const standing = placedAt(defaultAt(path.slice(0, depth)), place)
    if (standing.kind === 'list') return setInList(standing, change, depth)
  }
  return setInMapping({ kind: 'mapping', place, entries: new Map() }, change, depth)
}

function defaultAt(path: readonly string[]): unknown {
  let value: unknown = complete({})
  for (const step of path) {
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, step)) return undefined
    value = (value as Record<string, unknown>)[step]
  }
  return value
}

function isIndex(step: string | undefined): boolean {
  return step !== undefined && /^\d+$/.test(step)
}
