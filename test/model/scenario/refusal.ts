import { resolve } from '../../../src/model/scenario/resolve.ts'

/** The message with which a scenario document is refused. */
export function refusal(document: unknown): string {
  try {
    resolve(document)
  } catch (error) {
    return (error as Error).message
  }
  throw new Error('nothing was refused')
}
