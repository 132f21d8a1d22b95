import { Writable } from 'node:stream'
import type { CommandContext } from '../../src/io/command.ts'
import { commandLine } from '../../src/io/commandLine.ts'

function collector(): { stream: Writable; text(): string } {
  const parts: string[] = []
  const stream = new Writable({
    write(chunk, _encoding, done) {
      parts.push(String(chunk))
      done()
    },
  })
  return { stream, text: () => parts.join('') }
}

export interface Captured {
  code: number
  stdout: string
  stderr: string
}

/** Runs a command line in this process and captures what it says. */
export async function captured(
  words: string[],
  places: { workingDirectory: string; scenarioDirectory: string; memberWorker?: string },
): Promise<Captured> {
  const stdout = collector()
  const stderr = collector()
  const context: CommandContext = {
    terminal: {
      stdout: stdout.stream,
      stderr: stderr.stream,
      workingDirectory: places.workingDirectory,
      calledAs: 'mesofrost',
    },
    scenarioDirectory: places.scenarioDirectory,
    memberWorker: places.memberWorker ?? 'none',
    identity: { name: 'mesofrost', version: '1.2.3', model: 'none', libraries: {} },
    watchStopSignals: () => ({ signal: () => null, release() {} }),
  }
  const code = await commandLine(words, context)
  return { code, stdout: stdout.text(), stderr: stderr.text() }
}
