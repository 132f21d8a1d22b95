/**
 * Holds a document against the schema and says, key by key, what is allowed instead.
 */
import type { z } from 'zod'
import { checkAlternatives } from './checkAlternatives.ts'
import { nearestWord } from './nearestWord.ts'
import { type Path, problem, ScenarioError, type ScenarioProblem } from './problems.ts'
import { type ScenarioDocument, scenarioJsonSchema, scenarioSchema } from './schema.ts'

/** The parts of JSON Schema that our own schema uses. */
interface SchemaNode {
  type?: string
  enum?: string[]
  format?: string
  pattern?: string
  minimum?: number
  exclusiveMinimum?: number
  maximum?: number
  minItems?: number
  maxItems?: number
  maxLength?: number
  properties?: Record<string, SchemaNode>
  items?: SchemaNode
}

/** Checks keys, types and ranges of single values and fills their defaults; throws a ScenarioError. */
export function validate(document: unknown): ScenarioDocument {
  const result = scenarioSchema.safeParse(document)
  if (result.success) return withoutConflicts(result.data)
  const schema = scenarioJsonSchema() as SchemaNode
  throw new ScenarioError(
    result.error.issues.flatMap((issue) => problemsOf(issue, document, schema)),
  )
}

function withoutConflicts(document: ScenarioDocument): ScenarioDocument {
  const problems = checkAlternatives(document)
  if (problems.length > 0) throw new ScenarioError(problems)
  return document
}

function problemsOf(
  issue: z.core.$ZodIssue,
  document: unknown,
  schema: SchemaNode,
): ScenarioProblem[] {
  const path = issue.path as Path
  const node = nodeAt(schema, path)
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => unknownKey(path, key, node))
  }
  const value = valueAt(document, path)
  const what = value === undefined ? 'is missing' : `${shownValue(value)} is not allowed`
  return [problem(path, `${what}; allowed: ${allowedText(node)}${didYouMean(value, node.enum)}`)]
}

function unknownKey(path: Path, key: string, node: SchemaNode): ScenarioProblem {
  const known = Object.keys(node.properties ?? {})
  const hint = didYouMean(key, known)
  return {
    path: [...path, key],
    at: 'key',
    message: `unknown key; allowed here: ${known.join(', ')}${hint}`,
  }
}

function didYouMean(value: unknown, words: readonly string[] | undefined): string {
  const nearest = typeof value === 'string' ? nearestWord(value, words ?? []) : null
  return nearest === null ? '' : `; did you mean ${nearest}?`
}

function nodeAt(schema: SchemaNode, path: Path): SchemaNode {
  let node = schema
  for (const step of path) {
    node = (typeof step === 'number' ? node.items : node.properties?.[step]) ?? {}
  }
  return node
}

function valueAt(document: unknown, path: Path): unknown {
  let value = document
  for (const step of path) {
    if (typeof value !== 'object' || value === null) return undefined
    value = (value as Record<string | number, unknown>)[step]
  }
  return value
}

const SHOWN_LENGTH = 60

export function shownValue(value: unknown): string {
  const text = typeof value === 'number' ? String(value) : (JSON.stringify(value) ?? String(value))
  return text.length > SHOWN_LENGTH ? `${text.slice(0, SHOWN_LENGTH)}...` : text
}

function allowedText(node: SchemaNode): string {
  if (node.enum !== undefined) return `one of ${node.enum.join(', ')}`
  switch (node.type) {
    case 'number':
      return `a number ${rangeText(node)}`
    case 'integer':
      return `a whole number ${rangeText(node)}`
    case 'boolean':
      return 'true or false'
    case 'string':
      return textRule(node)
    case 'array':
      return `a list of ${countText(node)}`
    default:
      return `a mapping with the keys ${Object.keys(node.properties ?? {}).join(', ')}`
  }
}

function rangeText({ minimum, exclusiveMinimum, maximum }: SchemaNode): string {
  if (exclusiveMinimum !== undefined) return `above ${exclusiveMinimum}, up to ${maximum}`
  return minimum === undefined ? 'that is finite' : `from ${minimum} to ${maximum}`
}

function countText({ minItems, maxItems }: SchemaNode): string {
  if (minItems !== undefined && minItems === maxItems) return `${minItems} values`
  return `${minItems ?? 0} to ${maxItems ?? 'any number of'} values`
}

function textRule({ format, pattern, maxLength }: SchemaNode): string {
  if (format === 'date-time') return 'a UTC time such as 2026-07-01T00:00:00Z'
  if (pattern !== undefined) return `text of the form ${pattern}`
  return maxLength === undefined ? 'text' : `text of up to ${maxLength} letters`
}
