import type { Writable } from 'node:stream'

/** Where a command writes: results to stdout, everything else to stderr. */
export interface Terminal {
  stdout: Writable
  stderr: Writable & { isTTY?: boolean }
  workingDirectory: string
  /** How the user calls the program, for what it suggests to type next. */
  calledAs: string
}

/** Writes a result and waits while the reader is slower than we are. */
export async function print({ stdout }: Terminal, text: string): Promise<void> {
  if (stdout.write(text) || stdout.destroyed) return
  await new Promise<void>((resolve) => {
    const goOn = () => {
      stdout.off('drain', goOn).off('close', goOn)
      resolve()
    }
    stdout.on('drain', goOn).on('close', goOn)
  })
}

export function warn(terminal: Terminal, text: string): void {
  terminal.stderr.write(`mesofrost: ${text}\n`)
}
