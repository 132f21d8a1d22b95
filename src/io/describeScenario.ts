import type { Profile, Scenario } from '../model/scenario/types.ts'
import { shortNumber } from './textTable.ts'

/** Longer lists, such as the members of a random wave field, are only counted. */
const MOST_MEMBERS_SHOWN = 8

function isProfile(value: object): value is Profile {
  return 'altitudes_m' in value && 'values' in value
}

function range(values: number[]): string {
  const low = shortNumber(Math.min(...values))
  const high = shortNumber(Math.max(...values))
  return low === high ? low : `${low} to ${high}`
}

function profileText({ altitudes_m, times_s, values, logarithmic }: Profile): string {
  const times = times_s.length === 1 ? '' : ` at ${times_s.length} times (${range(times_s)} s)`
  const scale = logarithmic ? ', interpolated in the logarithm' : ''
  return `${range(values.flat())} over ${range(altitudes_m)} m${times}, ${altitudes_m.length} knots${scale}`
}

function scalarText(value: unknown): string {
  if (value === null) return 'none'
  return typeof value === 'number' ? shortNumber(value) : String(value)
}

function pairsOf(path: string, value: unknown): [string, string][] {
  if (value === null || typeof value !== 'object') return [[path, scalarText(value)]]
  if (isProfile(value)) return [[path, profileText(value)]]
  if (Array.isArray(value)) {
    if (value.length === 0) return [[path, 'none']]
    if (value.length > MOST_MEMBERS_SHOWN) return [[path, `${value.length} of them`]]
    return value.flatMap((member, i) => pairsOf(`${path}.${i}`, member))
  }
  return Object.entries(value).flatMap(([key, inner]) =>
    pairsOf(path === '' ? key : `${path}.${key}`, inner),
  )
}

/** What was understood of a scenario, key by key in SI units, with profiles told by their ranges. */
export function describeScenario(scenario: Scenario): [key: string, value: string][] {
  return pairsOf('', scenario)
}
