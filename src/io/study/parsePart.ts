import { InputError } from '../../model/errors.ts'

/** One of several shares of a study, counted from 1. */
export interface Part {
  number: number
  of: number
}

/** Reads a share such as 2/5. */
export function parsePart(text: string): Part {
  const [, number, of] = /^\s*(\d+)\s*\/\s*(\d+)\s*$/.exec(text)?.map(Number) ?? []
  if (number === undefined || number < 1 || number > of)
    throw new InputError(
      `--part ${text}: expected i/n with i from 1 to n, such as 2/5 for the second of five shares`,
    )
  return { number, of }
}

/** The members of a share: every `of`-th, so that all shares are about as much work. */
export function* shareOf({ number, of }: Part, memberCount: number): Generator<number> {
  for (let index = number - 1; index < memberCount; index += of) yield index
}
