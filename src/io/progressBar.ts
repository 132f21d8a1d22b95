import type { SingleBar } from 'cli-progress'
import type { Terminal } from './terminal.ts'

/** A bar is drawn at most this often, ms. */
const INTERVAL_MS = 100

/** A bar on a terminal that leaves no trace when it ends. */
export async function progressBar({ stderr }: Terminal, format: string): Promise<SingleBar> {
  const { default: cliProgress } = await import('cli-progress')
  return new cliProgress.SingleBar({
    format,
    stream: stderr,
    fps: 1000 / INTERVAL_MS,
    hideCursor: null,
    clearOnComplete: true,
    gracefulExit: false,
    barCompleteChar: '#',
    barIncompleteChar: '.',
  })
}
