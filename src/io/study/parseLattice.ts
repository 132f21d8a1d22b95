import { InputError } from '../../model/errors.ts'

const NUMBER = String.raw`([+-]?\d+(?:\.\d*)?)`

/**
 * Reads FROM..TO/STEP with a unit, such as 80..92/2km; a single value stands for itself.
 *
 * @param option how messages call it
 */
export function parseLattice(
  text: string,
  unit: 'km' | 'h',
  option: string,
): [from: number, to: number, step: number] {
  const match = new RegExp(`^${NUMBER}(?:\\.\\.${NUMBER}/${NUMBER})? *${unit}$`).exec(text.trim())
  if (match === null)
    throw new InputError(
      `--${option} ${text}: expected FROM..TO/STEP and the unit ${unit}, such as ${unit === 'km' ? '80..92/2km' : '0..20/4h'}`,
    )
  const [from, to, step] = match.slice(1).map((part) => (part === undefined ? null : Number(part)))
  return [from as number, to ?? (from as number), step ?? 1]
}

/** Reads a span of time FROM..TO, such as 18..24h. */
export function parseSpan(text: string, option: string): [from_h: number, to_h: number] {
  const match = new RegExp(`^${NUMBER}\\.\\.${NUMBER} *h$`).exec(text.trim())
  if (match === null)
    throw new InputError(`--${option} ${text}: expected FROM..TO and the unit h, such as 18..24h`)
  return [Number(match[1]), Number(match[2])]
}
