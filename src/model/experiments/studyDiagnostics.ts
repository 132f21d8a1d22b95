import { InputError } from '../errors.ts'
import { nearestWord } from '../scenario/nearestWord.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import type { MemberOutcome } from './runMember.ts'

type Finished = Extract<MemberOutcome, { status: 'done' }>

/** Numbers of the summary that have no channel, before and after those that have. */
const BEFORE_CHANNELS = [
  'peak_altitude_km',
  'thickness_km',
  'ice_number_per_cm3',
  'mean_radius_nm',
  'effective_radius_nm',
  'ice_water_content_ng_per_m3',
  'column_ice_ug_per_m2',
]
const AFTER_CHANNELS = [
  'water_residual',
  'most_column_ice_ug_per_m2',
  'most_column_ice_at_h',
  'largest_budget_residual',
]

/** Names of the numbers in the summary of a run of this scenario, in their order. */
export function summaryNames({ channels }: ScenarioDocument): string[] {
  const perChannel = channels.flatMap(({ name, geometry }) =>
    geometry === 'albedo'
      ? [`albedo_${name}_per_sr`, `albedo_${name}_mie_per_sr`]
      : [`peak_backscatter_${name}_per_m_sr`, `peak_backscatter_${name}_mie_per_m_sr`],
  )
  return [...BEFORE_CHANNELS, ...perChannel, ...AFTER_CHANNELS]
}

/** Headlines that have a mean over the last hours: column ice, and the albedo of each channel. */
function meanName(quantity: string, channel: string | null): string {
  return channel === null
    ? `mean_${quantity}`
    : `mean_${quantity.replace('albedo', `albedo_${channel}`)}`
}

const ALBEDOS = ['albedo_per_sr', 'albedo_mie_per_sr']

function meanNames({ channels }: ScenarioDocument): string[] {
  return [
    meanName('column_ice_ug_per_m2', null),
    ...channels.flatMap(({ name }) => ALBEDOS.map((quantity) => meanName(quantity, name))),
  ]
}

/** Names of the diagnostics that a study keeps. Throws an InputError for one that does not exist. */
export function diagnosticNames(
  base: ScenarioDocument,
  {
    diagnostics,
    last_hours_mean,
  }: { diagnostics?: string[] | undefined; last_hours_mean?: number | undefined },
): string[] {
  const known = summaryNames(base)
  const means = last_hours_mean === undefined ? [] : meanNames(base)
  const unknown = diagnostics?.find((name) => ![...known, ...means].includes(name))
  if (unknown !== undefined) {
    const nearest = nearestWord(unknown, [...known, ...means])
    const hint = nearest === null ? '' : `; did you mean ${nearest}?`
    throw new InputError(
      `diagnostics: no ${unknown}; allowed: ${[...known, ...means].join(', ')}${hint}`,
    )
  }
  const kept = diagnostics ?? known.filter((name) => !name.endsWith('_residual'))
  return [...new Set([...kept, ...means])]
}

/** Output times may differ by rounding. */
const SAME_TIME_H = 1e-9

/** The means of the headlines over the last hours of a run. */
export function lastHoursMeans(outcome: Finished, hours: number): Record<string, number | null> {
  const { time_h, series } = outcome.headlines
  const from = time_h[time_h.length - 1] - hours - SAME_TIME_H
  const first = time_h.findIndex((time) => time >= from)
  const wanted = series.filter(
    ({ quantity, channel }) => channel === null || ALBEDOS.includes(quantity),
  )
  return Object.fromEntries(
    wanted.map(({ quantity, channel, values }) => {
      const last = values.slice(first)
      const mean = last.reduce((sum, value) => sum + value, 0) / last.length
      return [meanName(quantity, channel), Number.isFinite(mean) ? mean : null]
    }),
  )
}
