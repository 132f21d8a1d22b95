import { lookedAt } from './lookedAt.ts'
import type { ResponseMapCell, ResponseMapMember, ResponseMapPlan } from './responseMapPlan.ts'
import type { MemberOutcome } from './runMember.ts'

/** One cell of the map in one channel. */
export interface ResponseMapRow {
  band_bottom_km: number
  band_top_km: number
  onset_h: number
  /** albedo_per_sr (Rayleigh) or albedo_mie_per_sr; for a lidar the backscatter integrated over the column. */
  quantity: string
  channel: string
  /** d ln(brightness) per unit of the change; null where flagged. */
  response: number | null
  /** That unit: K, percent, ppmv, cm/s, m2/s or /cm3. */
  per: string
  /** How much the response moves with tolerances a hundred times tighter. */
  floor: number | null
  /** |response/(response to half the change) - 1|. */
  nonlinearity: number | null
  flagged: 'below floor' | 'no cloud' | 'failed' | null
}

const QUANTITIES = ['albedo_per_sr', 'albedo_mie_per_sr'] as const

type Role = ResponseMapMember['role']
/** ln(brightness) of a run; null when it has no cloud, undefined when it did not finish. */
type LogBrightness = number | null | undefined

/**
 * The map, cell by cell: R = (ln B' - ln B)/amount.
 *
 * @param outcomes one per member of the plan, in its order; null where one is missing
 */
export function responseMapTable(
  plan: ResponseMapPlan,
  outcomes: readonly (MemberOutcome | null)[],
): ResponseMapRow[] {
  const places = new Map(plan.members.map(({ role, cell }, i) => [`${role} ${cell}`, i]))
  return plan.cells.flatMap((cell, c) =>
    plan.control.channels.flatMap(({ name }) =>
      QUANTITIES.map((quantity) => {
        const brightness = (role: Role) => {
          const owner = role === 'control' || role === 'tight control' ? null : c
          const outcome = outcomes[places.get(`${role} ${owner}`) ?? -1]
          return logBrightness(plan, outcome ?? null, quantity, name)
        }
        return {
          ...placeOf(cell),
          quantity,
          channel: name,
          per: plan.per,
          ...respond(brightness, plan.amount),
        }
      }),
    ),
  )
}

function placeOf({ band_km, onset_h }: ResponseMapCell) {
  return { band_bottom_km: band_km[0], band_top_km: band_km[1], onset_h }
}

function logBrightness(
  { when }: ResponseMapPlan,
  outcome: MemberOutcome | null,
  quantity: string,
  channel: string,
): LogBrightness {
  if (outcome?.status !== 'done') return undefined
  const { time_h, series } = outcome.headlines
  const values = series.find((one) => one.quantity === quantity && one.channel === channel)?.values
  const seen = lookedAt(time_h, when).map((i) => values?.[i] ?? Number.NaN)
  const mean = seen.reduce((sum, value) => sum + value, 0) / seen.length
  return mean > 0 ? Math.log(mean) : null
}

function respond(
  brightness: (role: Role) => LogBrightness,
  amount: number,
): Pick<ResponseMapRow, 'response' | 'floor' | 'nonlinearity' | 'flagged'> {
  const roles: Role[] = ['control', 'changed', 'half', 'tight control', 'tight changed']
  const values = roles.map(brightness)
  const nothing = { response: null, floor: null, nonlinearity: null }
  if (values.includes(undefined)) return { ...nothing, flagged: 'failed' }
  if (values.includes(null)) return { ...nothing, flagged: 'no cloud' }
  const [control, changed, half, tightControl, tightChanged] = values as number[]
  const response = (changed - control) / amount
  const floor = Math.abs(response - (tightChanged - tightControl) / amount)
  if (Math.abs(response) <= floor) return { ...nothing, floor, flagged: 'below floor' }
  const ofHalf = (half - control) / (amount / 2)
  const nonlinearity = ofHalf === 0 ? null : Math.abs(response / ofHalf - 1)
  return { response, floor, nonlinearity, flagged: null }
}
