import type { ResponseMapOptions } from '../../model/experiments/responseMap.ts'
import type { CommandArguments } from '../command.ts'
import { parseTime } from '../timeText.ts'
import { parseLattice, parseSpan } from './parseLattice.ts'

const ONSETS_UNASKED = 6

/** What the command line asks of a response map, once the length of the run is known. */
export function responseMapOptions(
  args: CommandArguments,
): (duration_h: number) => ResponseMapOptions {
  const text = (name: string) => args[name] as string | undefined
  const [amount, onsets, at, mean] = ['amount', 'onsets', 'at', 'mean'].map(text)
  const common = {
    quantity: args.quantity as ResponseMapOptions['quantity'],
    bands_km: parseLattice(args.bands as string, 'km', 'bands'),
    duration_h: parseTime(args.duration as string) / 3600,
    ...(amount === undefined ? {} : { amount }),
    ...(at === undefined ? {} : { when: { at_h: parseTime(at) / 3600 } }),
    ...(mean === undefined ? {} : { when: { mean_h: parseSpan(mean, 'mean') } }),
  }
  const asked = onsets === undefined ? null : parseLattice(onsets, 'h', 'onsets')
  return (duration_h) => ({ ...common, onsets_h: asked ?? evenOnsets(duration_h) })
}

function evenOnsets(duration_h: number): [number, number, number] {
  const step_h = duration_h / ONSETS_UNASKED
  return [0, duration_h - step_h, step_h]
}
