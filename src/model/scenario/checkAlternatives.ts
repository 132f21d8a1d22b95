/**
 * Keys of which exactly one, or at most one, may be given.
 */
import { type Path, problem, type ScenarioProblem } from './problems.ts'
import { type ProfileName, profileForms, profileQuantities } from './profileQuantities.ts'
import type { ScenarioDocument } from './schema.ts'

export function checkAlternatives(document: ScenarioDocument): ScenarioProblem[] {
  const names = Object.keys(profileQuantities) as ProfileName[]
  return [
    ...names.flatMap((name) => checkProfileForms(document, name)),
    ...checkMeasuredForms(document.temperature.measured),
  ]
}

function checkProfileForms(document: ScenarioDocument, name: ProfileName): ScenarioProblem[] {
  const profile = document[name]
  const used = profileForms.filter((form) => profile[form] !== undefined)
  if (used.length > 1) return [besides([name, used[1]], used[0])]
  return (profile.series ?? []).flatMap((entry, i) => {
    const path = [name, 'series', i]
    if (entry.knots !== undefined && entry.table !== undefined) {
      return [besides([...path, 'table'], 'knots')]
    }
    const isEmpty = entry.knots === undefined && entry.table === undefined
    return isEmpty ? [problem(path, 'needs knots or a table beside time_h')] : []
  })
}

function checkMeasuredForms(measured: ScenarioDocument['temperature']['measured']) {
  if (measured === undefined) return []
  const path = ['temperature', 'measured']
  const inline = (['time_h', 'altitude_km', 'temperature_K'] as const).filter(
    (key) => measured[key] !== undefined,
  )
  if (measured.file !== undefined) {
    return inline.slice(0, 1).map((key) => besides([...path, key], 'file'))
  }
  return inline.length === 3
    ? []
    : [problem(path, 'needs time_h, altitude_km and temperature_K together, or a file')]
}

function besides(path: Path, other: string): ScenarioProblem {
  return { path, at: 'key', message: `stands beside ${other}; allowed: one of them` }
}
