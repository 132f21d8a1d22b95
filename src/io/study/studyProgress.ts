import { progressBar } from '../progressBar.ts'
import type { Terminal } from '../terminal.ts'

/** Tells the user how far a study is. */
export interface StudyProgress {
  /** One more member is done. */
  count(): void
  end(): void
}

const PLAIN_INTERVAL_MS = 10_000

export const silentStudyProgress: StudyProgress = { count() {}, end() {} }

/** A span of time as a person would say it. */
export function spanText(seconds: number): string {
  if (seconds < 90) return `${Math.round(seconds)} s`
  if (seconds < 5400) return `${Math.round(seconds / 60)} min`
  return `${(seconds / 3600).toFixed(1)} h`
}

/** Members per unit of time, in the unit that makes the number handy. */
export function rateText(perSecond: number): string {
  if (perSecond >= 1) return `${perSecond.toPrecision(3)}/s`
  if (perSecond * 60 >= 1) return `${(perSecond * 60).toPrecision(3)}/min`
  return `${(perSecond * 3600).toPrecision(3)}/h`
}

/**
 * How many are done, at which rate, and how long the rest takes at that rate.
 *
 * @param elapsed_s since the first of the `fresh` members began
 */
export function progressText(
  { done, total, fresh }: { done: number; total: number; fresh: number },
  elapsed_s: number,
): string {
  const perSecond = fresh / Math.max(elapsed_s, 1e-3)
  if (fresh === 0) return `${done} of ${total} done`
  const left = spanText((total - done) / perSecond)
  return `${done} of ${total} done, ${rateText(perSecond)}, ${left} left`
}

/** A line for the first member and then now and then, for a log. */
function plainProgress({ stderr }: Terminal, total: number, already: number): StudyProgress {
  const start = performance.now()
  let lastLine = Number.NEGATIVE_INFINITY
  let fresh = 0
  return {
    count() {
      fresh++
      const now = performance.now()
      if (now - lastLine < PLAIN_INTERVAL_MS && already + fresh < total) return
      lastLine = now
      const text = progressText({ done: already + fresh, total, fresh }, (now - start) / 1000)
      stderr.write(`mesofrost: ${text}\n`)
    },
    end() {},
  }
}

async function barProgress(
  terminal: Terminal,
  total: number,
  already: number,
): Promise<StudyProgress> {
  const bar = await progressBar(terminal, '{bar} {state}')
  const start = performance.now()
  let fresh = 0
  const state = () =>
    progressText({ done: already + fresh, total, fresh }, (performance.now() - start) / 1000)
  bar.start(total, already, { state: state() })
  return {
    count() {
      fresh++
      bar.update(already + fresh, { state: state() })
    },
    end: () => bar.stop(),
  }
}

/**
 * A bar on a terminal, occasional lines elsewhere.
 *
 * @param already how many of the total are done before it begins
 */
export async function showStudyProgress(
  terminal: Terminal,
  total: number,
  already: number,
): Promise<StudyProgress> {
  const show = terminal.stderr.isTTY ? barProgress : plainProgress
  return show(terminal, total, already)
}
