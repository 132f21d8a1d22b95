import {
  isAlias,
  isMap,
  isScalar,
  isSeq,
  LineCounter,
  type Node,
  parseDocument,
  type YAMLError,
} from 'yaml'
import { InputError } from '../../model/errors.ts'
import { type Place, type PlacedEntry, type PlacedValue, placeText } from './placedValue.ts'

/** Parts that aliases may spell out: a few letters of nested aliases can mean billions. */
const MOST_ALIASED_PARTS = 100_000

interface Reading {
  placeAt(offset: number): Place
  anchors: Map<string, Node>
  aliasDepth: number
  aliasedParts: number
}

/**
 * YAML or JSON text (JSON is YAML) as a placed value.
 * @param origin place of the text as a whole; its line counts from 1, or is null for an override
 */
export function parsePlacedYaml(text: string, origin: Place): PlacedValue {
  const lines = new LineCounter()
  const placeAt = (offset: number): Place => {
    if (origin.line === null) return origin
    const { line, col } = lines.linePos(offset)
    return { ...origin, line, column: col }
  }
  try {
    const document = parseDocument(text, { lineCounter: lines, prettyErrors: false })
    const wrong = document.errors[0] ?? document.warnings[0]
    if (wrong !== undefined) throw syntaxError(wrong, placeAt(wrong.pos[0]))
    const anchors = new Map<string, Node>()
    return fromNode(document.contents, 0, { placeAt, anchors, aliasDepth: 0, aliasedParts: 0 })
  } catch (error) {
    if (error instanceof RangeError) throw new InputError(`${origin.source} is nested too deeply`)
    throw error
  }
}

function syntaxError({ message }: YAMLError, place: Place): Error {
  // The parser reports an exhausted call stack as a fault of the text.
  if (message.includes('call stack')) return new RangeError(message)
  return new InputError(`${placeText(place)}: not valid YAML: ${message}`)
}

/** @param offset where an absent value would stand */
function fromNode(node: Node | null, offset: number, reading: Reading): PlacedValue {
  const place = reading.placeAt(node?.range?.[0] ?? offset)
  if (isAlias(node)) return fromAlias(node.source, place, reading)
  if (reading.aliasDepth > 0) reading.aliasedParts += 1
  if (reading.aliasedParts > MOST_ALIASED_PARTS) {
    throw new InputError(`${place.source} has too many aliases`)
  }
  if (node?.anchor !== undefined) reading.anchors.set(node.anchor, node)
  if (isMap(node)) {
    const entries = node.items.map(({ key, value }): [string, PlacedEntry] => {
      const keyNode = key as Node | null
      const keyStart = keyNode?.range?.[0] ?? offset
      const placed = fromNode(value as Node | null, keyStart, reading)
      return [keyText(keyNode), { keyPlace: reading.placeAt(keyStart), value: placed }]
    })
    return { kind: 'mapping', place, entries: new Map(entries) }
  }
  if (isSeq(node)) {
    const items = node.items.map((item) => fromNode(item as Node | null, offset, reading))
    return { kind: 'list', place, items }
  }
  return { kind: 'scalar', place, value: isScalar(node) ? node.value : null }
}

function fromAlias(anchor: string, place: Place, reading: Reading): PlacedValue {
  const node = reading.anchors.get(anchor)
  if (node === undefined) {
    throw new InputError(`${placeText(place)}: not valid YAML: no anchor &${anchor} above`)
  }
  reading.aliasDepth += 1
  const value = fromNode(node, 0, reading)
  reading.aliasDepth -= 1
  return value
}

function keyText(key: Node | null): string {
  return isScalar(key) ? String(key.value) : String(key)
}
