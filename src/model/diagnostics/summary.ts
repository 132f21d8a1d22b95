import type { Column } from '../state/column.ts'
import { HOUR, KILOMETRE } from '../units.ts'
import type { Diagnosis } from './diagnose.ts'
import { layerShape } from './layer.ts'

/** Share of the ice in the largest class above which a run warns: growth past that class stops. */
const LARGEST_CLASS_WARNING = 1e-4

/** Collects the summary of a run while it passes by. */
export interface RunningSummary {
  add(diagnosis: Diagnosis): void
  /** Named numbers, null where there is no cloud, and warnings that only the whole run can give. */
  result(): { numbers: Record<string, number | null>; warnings: string[] }
}

/** State of the layer at the end of the run, and when and how strong it was at its most. */
export function summarise(column: Column): RunningSummary {
  let last: Diagnosis | null = null
  let mostIce = { amount: 0, time_h: 0 }
  let largestClassShare = 0
  let worstResidual = 0
  return {
    add(diagnosis) {
      last = diagnosis
      const ice = diagnosis.budget.column_ice_ug_per_m2
      if (ice > mostIce.amount) mostIce = { amount: ice, time_h: diagnosis.time_s / HOUR }
      largestClassShare = Math.max(largestClassShare, shareInLargestClass(column, diagnosis))
      for (const [name, value] of Object.entries(diagnosis.budget)) {
        if (name.endsWith('_residual')) worstResidual = Math.max(worstResidual, Math.abs(value))
      }
    },
    result() {
      const numbers = last === null ? {} : atTheEnd(column, last)
      return {
        numbers: {
          ...numbers,
          most_column_ice_ug_per_m2: mostIce.amount,
          most_column_ice_at_h: mostIce.amount > 0 ? mostIce.time_h : null,
          largest_budget_residual: worstResidual,
        },
        warnings:
          largestClassShare > LARGEST_CLASS_WARNING ? [fullClass(column, largestClassShare)] : [],
      }
    },
  }
}

function fullClass({ sizes }: Column, share: number): string {
  const radius = (sizes.radii_m[sizes.count - 1] * 1e9).toFixed(0)
  return `the largest class (${radius} nm) held up to ${(share * 100).toPrecision(2)} % of the ice, and growth past it stops; raise sizes.largest_nm`
}

function shareInLargestClass({ sizes, layout }: Column, { numberPerClass }: Diagnosis): number {
  const last = sizes.count - 1
  let largest = 0
  let all = 0
  for (let i = 0; i < layout.levels; i++) {
    for (let k = 0; k <= last; k++) {
      const water = numberPerClass[i * sizes.count + k] * sizes.molecules[k]
      all += water
      if (k === last) largest += water
    }
  }
  return all > 0 ? largest / all : 0
}

/** The layer is where the ice water content is: its numbers are those of the level with the most ice. */
function atTheEnd(
  column: Column,
  { profiles, budget, brightness }: Diagnosis,
): Record<string, number | null> {
  const content = profiles.ice_water_content_ng_per_m3
  const thickness_m = profiles.stretching.map((stretch) => stretch * column.grid.spacing_m)
  const altitude_m = profiles.displaced_altitude_km.map((z) => z * KILOMETRE)
  const shape = layerShape(content, altitude_m, thickness_m)
  const peak = content.indexOf(Math.max(...content))
  const there = (name: string) => (shape ? orNull(profiles[name][peak]) : null)
  return {
    peak_altitude_km: shape && shape.peakAltitude_m / KILOMETRE,
    thickness_km: shape && shape.thickness_m / KILOMETRE,
    ice_number_per_cm3: there('ice_number_per_cm3'),
    mean_radius_nm: there('mean_radius_nm'),
    effective_radius_nm: there('effective_radius_nm'),
    ice_water_content_ng_per_m3: shape?.peak ?? null,
    column_ice_ug_per_m2: budget.column_ice_ug_per_m2,
    ...channelNumbers(brightness),
    water_residual: budget.water_residual,
  }
}

function channelNumbers(brightness: Diagnosis['brightness']): Record<string, number | null> {
  const entries = brightness.channel.flatMap((channel, c): [string, number | null][] => {
    const number = (name: string) => orNull(brightness[name][c] as number)
    const peak = number('peak_backscatter_per_m_sr')
    return peak === null
      ? [
          [`albedo_${channel}_per_sr`, number('albedo_per_sr')],
          [`albedo_${channel}_mie_per_sr`, number('albedo_mie_per_sr')],
        ]
      : [
          [`peak_backscatter_${channel}_per_m_sr`, peak],
          [`peak_backscatter_${channel}_mie_per_m_sr`, number('peak_backscatter_mie_per_m_sr')],
        ]
  })
  return Object.fromEntries(entries)
}

function orNull(value: number): number | null {
  return Number.isFinite(value) ? value : null
}
