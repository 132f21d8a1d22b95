import { excludedBy } from '../../model/scenario/alternatives.ts'
import type { PlacedEntry, PlacedMapping, PlacedValue } from './placedValue.ts'

/**
 * A scenario laid over the one it extends: mappings merge key by key, everything else is replaced. A key set to null
 * takes the value away, which brings the default back; choosing one alternative (say `file`) drops the other (`knots`).
 */
export function mergePlaced(
  below: PlacedMapping,
  above: PlacedMapping,
  section = '',
): PlacedMapping {
  const entries = new Map(below.entries)
  for (const [key, entry] of above.entries) {
    for (const excluded of excludedBy(section, key)) {
      if (!above.entries.has(excluded)) entries.delete(excluded)
    }
    layEntry(entries, key, entry, section)
  }
  return { kind: 'mapping', place: above.place, entries }
}

function layEntry(
  entries: Map<string, PlacedEntry>,
  key: string,
  entry: PlacedEntry,
  section: string,
): void {
  const former = entries.get(key)
  if (former !== undefined && isNull(entry.value)) {
    entries.delete(key)
    return
  }
  if (former?.value.kind === 'mapping' && entry.value.kind === 'mapping') {
    const inner = section === '' ? key : `${section}.${key}`
    const value = mergePlaced(former.value, entry.value, inner)
    entries.set(key, { keyPlace: entry.keyPlace, value })
    return
  }
  entries.set(key, entry)
}

function isNull(value: PlacedValue): boolean {
  return value.kind === 'scalar' && value.value === null
}
