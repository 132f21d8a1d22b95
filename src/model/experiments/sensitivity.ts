import { gridSlopes } from './gridSlopes.ts'
import { jointSlopes } from './jointSlopes.ts'
import { type IndexEstimate, sobolIndices } from './sobolIndices.ts'
import type { StudyPlan } from './study.ts'

/** What an axis does to a diagnostic. */
export interface SensitivityRow {
  /** slope: of a grid along one axis; joint slope: of a plane through all members; the rest: shares of the variance. */
  measure: 'slope' | 'joint slope' | 'first order' | 'total'
  axis: string
  diagnostic: string
  /** For slopes the fixed values of the other axes, such as 'temperature.offset_K = 2'; null over all of them. */
  where: string | null
  value: number | null
  /** Slopes: least and greatest local slope. Shares: 95 % bootstrap interval. */
  low: number | null
  high: number | null
  /** Such as 'd ln y/d ln x', 'd ln y per K', 'share of the variance'. */
  unit: string
  /** Members used, and members left out because there is no cloud or because they did not finish. */
  used: number
  left_out: number
}

/** Diagnostics of every member in the order of the plan; null where it failed or is missing. */
export type MemberResults = readonly (Readonly<Record<string, number | null>> | null)[]

/**
 * What the axes of a study do to its diagnostics: slopes for a grid, slopes of one plane through all members for a Latin
 * hypercube, first-order and total shares of the variance for a Sobol design. Axes of words and switches have no slope.
 */
export function sensitivityTable(plan: StudyPlan, results: MemberResults): SensitivityRow[] {
  switch (plan.design.kind) {
    case 'grid':
      return gridSlopes(plan, withClouds(plan, results))
    case 'latin_hypercube':
      return jointSlopes(plan, withClouds(plan, results))
    case 'sobol':
      return plan.diagnostics.flatMap((diagnostic) => varianceShares(plan, results, diagnostic))
  }
}

/** Members with less than this of the largest value of the study have no cloud to speak of. */
const NO_CLOUD = 1e-6

/** The results without what is no more than a trace: its logarithm would rule every slope. */
function withClouds({ diagnostics }: StudyPlan, results: MemberResults): MemberResults {
  const least = Object.fromEntries(
    diagnostics.map((name): [string, number] => [
      name,
      results.reduce((most, member) => Math.max(most, member?.[name] ?? 0), 0) * NO_CLOUD,
    ]),
  )
  return results.map(
    (member) =>
      member &&
      Object.fromEntries(
        Object.entries(member).map(([name, value]) => [
          name,
          value !== null && name in least && value < least[name] ? null : value,
        ]),
      ),
  )
}

function varianceShares(
  plan: StudyPlan,
  results: MemberResults,
  diagnostic: string,
): SensitivityRow[] {
  const { blocks, complete } = completeBlocks(plan, results, diagnostic)
  const value = (sample: number, role: 'a' | 'b' | number) =>
    results[blocks.index(sample, role)]?.[diagnostic] ?? Number.NaN
  const indices = sobolIndices(
    {
      a: complete.map((sample) => value(sample, 'a')),
      b: complete.map((sample) => value(sample, 'b')),
      mixed: plan.axes.map((_, i) => complete.map((sample) => value(sample, i))),
    },
    { seed: plan.seed },
  )
  const used = complete.length * (plan.axes.length + 2)
  const row = (measure: 'first order' | 'total', estimates: readonly (IndexEstimate | null)[]) =>
    plan.axes.map(({ key }, i): SensitivityRow => {
      const { value = null, low = null, high = null } = estimates[i] ?? {}
      const counts = { used, left_out: plan.memberCount - used }
      const name = { measure, axis: key, diagnostic, where: null }
      return { ...name, value, low, high, unit: 'share of the variance', ...counts }
    })
  return [...row('first order', indices.firstOrder), ...row('total', indices.total)]
}

/** Blocks of the design all members of which have the diagnostic: one that lacks a member says nothing. */
function completeBlocks({ design, axes }: StudyPlan, results: MemberResults, diagnostic: string) {
  if (design.kind !== 'sobol') throw new Error('only a Sobol design has blocks')
  const { blocks } = design
  const samples = Array.from({ length: blocks.samples }, (_, sample) => sample)
  const roles = ['a', 'b', ...axes.keys()] as const
  const has = (index: number) => (results[index]?.[diagnostic] ?? null) !== null
  const complete = samples.filter((sample) =>
    roles.every((role) => has(blocks.index(sample, role))),
  )
  return { blocks, complete }
}
