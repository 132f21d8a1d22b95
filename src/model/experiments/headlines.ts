import type { Diagnosis } from '../diagnostics/diagnose.ts'
import type { Scenario } from '../scenario/types.ts'

/** One quantity of a run against time: what comparisons of runs are made of. */
export interface HeadlineSeries {
  /** Name with its unit, such as column_ice_ug_per_m2. */
  quantity: string
  /** Name of the channel, or null for what has none. */
  channel: string | null
  /** One value per output time; NaN where there is none. */
  values: number[]
}

/** The headlines of a run at its output times. */
export interface Headlines {
  time_h: number[]
  series: HeadlineSeries[]
}

/** Quantities per channel, as named in `brightness.arrow`. */
export const BRIGHTNESS_HEADLINES = [
  'albedo_per_sr',
  'albedo_mie_per_sr',
  'peak_backscatter_per_m_sr',
  'peak_backscatter_mie_per_m_sr',
  'peak_altitude_km',
  'centroid_altitude_km',
  'thickness_km',
] as const

/** Collects the headlines while a run passes by. */
export function collectHeadlines(scenario: Scenario): {
  add(diagnosis: Diagnosis): void
  result(): Headlines
} {
  const time_h: number[] = []
  const ice: HeadlineSeries = { quantity: 'column_ice_ug_per_m2', channel: null, values: [] }
  const series = scenario.channels.flatMap(({ name, geometry }) =>
    BRIGHTNESS_HEADLINES.filter(
      (quantity) => geometry.kind === 'backscatter' || !quantity.startsWith('peak_backscatter'),
    ).map((quantity): HeadlineSeries => ({ quantity, channel: name, values: [] })),
  )
  return {
    add({ budget, brightness }) {
      time_h.push(budget.time_h)
      ice.values.push(budget.column_ice_ug_per_m2)
      for (const { quantity, channel, values } of series) {
        values.push(brightness[quantity][brightness.channel.indexOf(channel ?? '')] as number)
      }
    },
    result: () => ({ time_h, series: [ice, ...series] }),
  }
}
