import type { Headlines } from '../../../src/model/experiments/headlines.ts'
import { type MemberOutcome, runMember } from '../../../src/model/experiments/runMember.ts'
import { complete } from '../../../src/model/scenario/complete.ts'
import type { ScenarioDocument } from '../../../src/model/scenario/schema.ts'

export type Finished = Extract<MemberOutcome, { status: 'done' }>

/** A night small enough to be run many times: coarse, short, one channel; a layer of ice stands from the start. */
export function tinyNight(change: object = {}): ScenarioDocument {
  return complete({
    grid: { levels: 20 },
    sizes: { classes: 12 },
    duration_h: 3,
    output_every_min: 30,
    initial: {
      ice: [
        {
          altitude_km: 84,
          width_km: 2,
          number_per_cm3: 100,
          median_radius_nm: 20,
          geometric_width: 1.4,
        },
      ],
    },
    channels: [{ name: '532nm', wavelength_nm: 532, geometry: 'backscatter' }],
    ...change,
  })
}

export function run(document: ScenarioDocument): Finished {
  const outcome = runMember(document, { sceneTimes_h: [] })
  if (outcome.status === 'failed') throw new Error(outcome.reason)
  return outcome
}

export function seriesOf({ series }: Headlines, quantity: string): number[] {
  const found = series.find((one) => one.quantity === quantity)
  if (found === undefined) throw new Error(`no ${quantity}`)
  return found.values
}

/** The message with which a call is refused. */
export function refusalOf(call: () => unknown): string {
  try {
    call()
  } catch (error) {
    return `${(error as Error).name}: ${(error as Error).message}`
  }
  throw new Error('nothing was refused')
}
