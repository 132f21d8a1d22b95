/**
 * The errors that the model and its edges throw. Each carries the exit code of the command line it ends in.
 */

/** Bad input: the user can mend it. Exit code 2. */
export class InputError extends Error {
  override readonly name = 'InputError'
  readonly exitCode = 2
}

/** Where and what a run failed at; null where the place is unknown. */
export interface FailurePlace {
  time_s: number
  altitude_m: number | null
  quantity: string | null
}

/** The model could not go on: NaN, out of steps, or an exception in the right-hand side. Exit code 1. */
export class ModelError extends Error {
  override readonly name = 'ModelError'
  readonly exitCode = 1
  readonly place: FailurePlace

  constructor(message: string, place: FailurePlace) {
    super(message)
    this.place = place
  }
}
