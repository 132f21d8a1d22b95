import type { ScenarioDocument } from '../scenario/schema.ts'
import type { PerturbedQuantity } from '../scenario/types.ts'

/** When the brightness is looked at: at an output time, or as the mean over the output times of a span. */
export type Look = { at_h: number } | { mean_h: readonly [number, number] }

export interface ResponseMapOptions {
  quantity: PerturbedQuantity
  /** Size of the small change as in a change, such as '+1K', '+5%', '+0.5cm/s'. Default: one per quantity. */
  amount?: string
  /** Lower edge of the first band, upper edge of the last, and thickness of each. */
  bands_km: readonly [from: number, to: number, step: number]
  /** First onset, last onset, and the step between. */
  onsets_h: readonly [from: number, to: number, step: number]
  /** Length of the pulse. */
  duration_h: number
  /** Default: the end of the run. */
  when?: Look
}

export interface ResponseMapCell {
  band_km: readonly [number, number]
  onset_h: number
}

export interface ResponseMapMember {
  /** 'half' has half the change, 'tight' runs a hundredth of the tolerances. */
  role: 'control' | 'tight control' | 'changed' | 'half' | 'tight changed'
  /** Index into the cells; null for the controls. */
  cell: number | null
  document: ScenarioDocument
}

export interface ResponseMapPlan {
  control: ScenarioDocument
  cells: ResponseMapCell[]
  members: ResponseMapMember[]
  /** What the response is counted per: K, percent, ppmv, cm/s, m2/s or /cm3. */
  per: string
  /** Size of the change in that unit. */
  amount: number
  when: Look
  /** What the map shows, in words. */
  words: string
}
