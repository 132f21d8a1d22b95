/** Exit codes of the program, and their meaning as --help tells it. */
export const EXIT_CODES = `Exit codes: 0 done, 1 the run failed, 2 bad input, 3 finished, but members failed or are missing,
130 interrupted by Ctrl-C, 143 terminated.`

export const DONE = 0
export const FAILED = 1
export const BAD_INPUT = 2
export const MEMBERS_FAILED = 3
