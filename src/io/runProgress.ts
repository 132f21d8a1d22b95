import { progressBar } from './progressBar.ts'
import type { Terminal } from './terminal.ts'
import { formatTime } from './timeText.ts'

/** Tells the user how far a run is. */
export interface RunProgress {
  reach(time_s: number): void
  end(): void
}

export interface ProgressRange {
  start_s: number
  end_s: number
}

const PLAIN_INTERVAL_MS = 10_000

export const silentProgress: RunProgress = { reach() {}, end() {} }

/** A line now and then, for a log. */
function plainProgress(terminal: Terminal, { end_s }: ProgressRange): RunProgress {
  let lastLine = performance.now()
  return {
    reach(time_s) {
      if (performance.now() - lastLine < PLAIN_INTERVAL_MS) return
      lastLine = performance.now()
      terminal.stderr.write(`mesofrost: ${formatTime(time_s)} of ${formatTime(end_s)}\n`)
    },
    end() {},
  }
}

async function barProgress(
  terminal: Terminal,
  { start_s, end_s }: ProgressRange,
): Promise<RunProgress> {
  const bar = await progressBar(terminal, '{bar} {hours} of {total_hours} h, {eta_formatted} to go')
  const total_hours = (end_s / 3600).toFixed(1)
  bar.start(end_s - start_s, 0, { hours: (start_s / 3600).toFixed(1), total_hours })
  return {
    reach(time_s) {
      bar.update(time_s - start_s, { hours: (time_s / 3600).toFixed(1), total_hours })
    },
    end: () => bar.stop(),
  }
}

/** A bar on a terminal, occasional lines elsewhere. */
export async function showProgress(terminal: Terminal, range: ProgressRange): Promise<RunProgress> {
  return terminal.stderr.isTTY ? barProgress(terminal, range) : plainProgress(terminal, range)
}
