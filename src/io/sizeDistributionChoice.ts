import type { Scenario } from '../model/scenario/types.ts'

export type SizeDistributionChoice = 'auto' | 'always' | 'never'

/** Above this size the file is only written when asked for. */
const LARGEST_UNASKED_BYTES = 200e6

/** Expected size of size-distribution.arrow: every class, altitude and time of each row takes eight bytes. */
export function sizeDistributionBytes(scenario: Scenario): number {
  const times = Math.ceil(scenario.duration_s / scenario.outputInterval_s) + 1
  return times * scenario.grid.levels * (scenario.sizes.classes + 2) * 8
}

/** Whether the file is written, and what to tell the user when its size decides against it. */
export function chooseSizeDistribution(
  scenario: Scenario,
  choice: SizeDistributionChoice,
): { write: boolean; notice: string | null } {
  const bytes = sizeDistributionBytes(scenario)
  if (choice !== 'auto') return { write: choice === 'always', notice: null }
  if (bytes <= LARGEST_UNASKED_BYTES) return { write: true, notice: null }
  return {
    write: false,
    notice: `size-distribution.arrow is left out because it would take ${Math.round(bytes / 1e6)} MB; --set output.size_distribution=always writes it`,
  }
}
