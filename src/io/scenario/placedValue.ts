/**
 * A value that remembers where each part of it was written, so that an error can name file, line and column.
 */
import type { Path } from '../../model/scenario/problems.ts'

export interface Place {
  /** File as the user named it, or the override `--set ...`. */
  source: string
  /** Directory that paths in this value are relative to. */
  directory: string
  /** Null for an override, which has no lines. */
  line: number | null
  column: number | null
}

export interface PlacedEntry {
  keyPlace: Place
  value: PlacedValue
}

export interface PlacedMapping {
  kind: 'mapping'
  place: Place
  entries: Map<string, PlacedEntry>
}

export type PlacedValue =
  | PlacedMapping
  | { kind: 'list'; place: Place; items: PlacedValue[] }
  | { kind: 'scalar'; place: Place; value: unknown }

/** The bare value. */
export function plain(placed: PlacedValue): unknown {
  switch (placed.kind) {
    case 'scalar':
      return placed.value
    case 'list':
      return placed.items.map(plain)
    case 'mapping':
      return Object.fromEntries([...placed.entries].map(([key, { value }]) => [key, plain(value)]))
  }
}

/** A bare value with one place throughout. */
export function placedAt(value: unknown, place: Place): PlacedValue {
  if (Array.isArray(value)) {
    return { kind: 'list', place, items: value.map((item) => placedAt(item, place)) }
  }
  if (typeof value !== 'object' || value === null) return { kind: 'scalar', place, value }
  const entries = Object.entries(value).map(
    ([key, item]) => [key, { keyPlace: place, value: placedAt(item, place) }] as const,
  )
  return { kind: 'mapping', place, entries: new Map(entries) }
}

/** Where a path was written, or the nearest enclosing part that was. */
export function placeOf(root: PlacedValue, path: Path, at: 'key' | 'value'): Place {
  let value = root
  let place = root.place
  for (const step of path) {
    if (value.kind === 'mapping') {
      const entry = value.entries.get(String(step))
      if (entry === undefined) break
      value = entry.value
      place = at === 'key' ? entry.keyPlace : value.place
    } else if (value.kind === 'list') {
      if (value.items[Number(step)] === undefined) break
      value = value.items[Number(step)]
      place = value.place
    } else break
  }
  return place
}

/** 'file:line:column', or the override. */
export function placeText({ source, line, column }: Place): string {
  return line === null ? source : `${source}:${line}:${column}`
}
