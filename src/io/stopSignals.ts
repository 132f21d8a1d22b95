export type StopSignal = 'SIGINT' | 'SIGTERM'

export const STOP_EXIT_CODES: Record<StopSignal, number> = { SIGINT: 130, SIGTERM: 143 }

/** Whether the user wants the run to stop. */
export interface StopWatch {
  /** The signal that has come, if any. */
  signal(): StopSignal | null
  /** Gives the signals their ordinary effect back. */
  release(): void
}

/** From now on a first Ctrl-C or SIGTERM is noted; a second ends the program at once. */
export function watchStopSignals(): StopWatch {
  let received: StopSignal | null = null
  const onSignal = (signal: StopSignal) => {
    if (received !== null) process.exit(STOP_EXIT_CODES[signal])
    received = signal
  }
  process.on('SIGINT', onSignal).on('SIGTERM', onSignal)
  return {
    signal: () => received,
    release() {
      process.off('SIGINT', onSignal).off('SIGTERM', onSignal)
    },
  }
}
