import { type ConvergencePlan, REFINEMENT_FACTORS, type Refinement } from './planConvergence.ts'
import type { MemberOutcome } from './runMember.ts'

/** What one refinement does to one diagnostic, and the error bar that follows. */
export interface ConvergenceRow {
  diagnostic: string
  /** 'together' adds up the error bars of all refinements. */
  refinement: Refinement | 'together'
  /** The diagnostic as the scenario stands, refined once, and twice. */
  base: number | null
  once: number | null
  twice: number | null
  /** once - base. */
  change: number | null
  relative_change: number | null
  /** Observed order: log(change of the first step/change of the second)/log(factor); null where not asymptotic. */
  order: number | null
  /** Half width of the error to quote with the base value, and the same relative to it. */
  error_bar: number | null
  relative_error_bar: number | null
  verdict: 'converging' | 'not asymptotic' | 'unchanged' | 'no cloud' | 'failed'
}

type Verdict = ConvergenceRow['verdict']

/**
 * Orders below this are no convergence to speak of, and their extrapolation is worthless. Common practice, no source.
 */
const LEAST_ORDER = 0.5

/** Relative changes below this are no more than the scatter of the solver, and judge nothing. */
const NEGLIGIBLE = 1e-6

/** Safety factors on the estimated error: of three grids in order, and of three that are not. Roache 1994, from memory. */
const SAFE_IN_ORDER = 1.25
const SAFE_OTHERWISE = 3

/**
 * The table of a convergence test, diagnostic by diagnostic. With d1 and d2 the changes of the first and second step and
 * f the factor between steps, the order is p = ln(d1/d2)/ln f and the error of the base |d1|/(1 - f^-p) (Richardson's
 * extrapolation), times 1.25. Where d1 and d2 differ in sign or do not shrink, 3 max(|d1|, |d2|) stands in. What is left
 * of the budget after rounding is no diagnostic and left out.
 *
 * @param outcomes one per member of the plan, in its order; null where one is missing
 */
export function convergenceTable(
  plan: ConvergencePlan,
  outcomes: readonly (MemberOutcome | null)[],
): ConvergenceRow[] {
  const finished = outcomes.flatMap((outcome) => (outcome?.status === 'done' ? [outcome] : []))
  const names = Object.keys(finished[0]?.diagnostics ?? {}).filter(
    (name) => !name.endsWith('_residual'),
  )
  return names.flatMap((diagnostic) => {
    const rows = (Object.keys(REFINEMENT_FACTORS) as Refinement[]).map((refinement) => {
      const values = ([0, 1, 2] as const).map((step) => {
        const place = plan.members.findIndex(
          (member) => member.step === step && (step === 0 || member.refinement === refinement),
        )
        const outcome = outcomes[place]
        return outcome?.status === 'done' ? (outcome.diagnostics[diagnostic] ?? null) : undefined
      })
      return { diagnostic, refinement, ...judge(values, REFINEMENT_FACTORS[refinement]) }
    })
    return [...rows, together(diagnostic, rows)]
  })
}

type Judgement = Omit<ConvergenceRow, 'diagnostic' | 'refinement'>

function judge(values: readonly (number | null | undefined)[], factor: number): Judgement {
  const [base = null, once = null, twice = null] = values
  if (base === null || once === null || twice === null) {
    const verdict: Verdict = values.includes(undefined) ? 'failed' : 'no cloud'
    return {
      base,
      once,
      twice,
      ...changeOf(base, once),
      ...barOf(base, null),
      order: null,
      verdict,
    }
  }
  const [first, second] = [once - base, twice - once]
  const order = Math.log(first / second) / Math.log(factor)
  const isUnchanged = Math.max(Math.abs(first), Math.abs(second)) <= NEGLIGIBLE * Math.abs(base)
  const isAsymptotic = order >= LEAST_ORDER && Number.isFinite(order)
  const error = isAsymptotic
    ? (SAFE_IN_ORDER * Math.abs(first)) / (1 - factor ** -order)
    : SAFE_OTHERWISE * Math.max(Math.abs(first), Math.abs(second))
  return {
    base,
    once,
    twice,
    ...changeOf(base, once),
    order: isAsymptotic ? order : null,
    ...barOf(base, error),
    verdict: isUnchanged ? 'unchanged' : isAsymptotic ? 'converging' : 'not asymptotic',
  }
}

function changeOf(base: number | null, once: number | null) {
  const change = base === null || once === null ? null : once - base
  return { change, relative_change: relative(change, base) }
}

function barOf(base: number | null, error: number | null) {
  return { error_bar: error, relative_error_bar: relative(error, base) }
}

function relative(value: number | null, base: number | null): number | null {
  return value === null || base === null || base === 0 ? null : value / Math.abs(base)
}

/** The errors of all refinements added up, as if all had the same sign. */
function together(diagnostic: string, rows: readonly ConvergenceRow[]): ConvergenceRow {
  const order: Verdict[] = ['failed', 'no cloud', 'not asymptotic', 'converging', 'unchanged']
  const verdict = order.find((one) => rows.some((row) => row.verdict === one)) ?? 'unchanged'
  const bars = rows.map(({ error_bar }) => error_bar)
  const error = bars.reduce((sum, bar) => (sum === null || bar === null ? null : sum + bar), 0)
  const { base } = rows[0]
  const nothing = { once: null, twice: null, change: null, relative_change: null, order: null }
  return { diagnostic, refinement: 'together', base, ...nothing, ...barOf(base, error), verdict }
}
