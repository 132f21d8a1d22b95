import { spawn } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { isBuildFresh } from '../../bin/setup.mjs'

const ROOT = fileURLToPath(new URL('../..', import.meta.url))

/** Path of the compiled program; fails when it was not compiled from the sources as they are. */
export function builtProgram(): string {
  if (!isBuildFresh(ROOT)) throw new Error('dist is not built from these sources: npm run build')
  return `${ROOT}dist/bin/mesofrost.js`
}

export interface Ended {
  code: number | null
  stdout: string
  stderr: string
}

/**
 * Starts a program and waits for its end.
 *
 * @param meanwhile may look at what goes on and send a signal
 */
export function ended(
  command: string,
  args: string[],
  workingDirectory: string,
  meanwhile: (kill: (signal: NodeJS.Signals) => void) => Promise<void> = async () => {},
): Promise<Ended> {
  const child = spawn(command, args, { cwd: workingDirectory, stdio: ['ignore', 'pipe', 'pipe'] })
  const said = { stdout: '', stderr: '' }
  child.stdout.on('data', (chunk) => {
    said.stdout += chunk
  })
  child.stderr.on('data', (chunk) => {
    said.stderr += chunk
  })
  return new Promise((resolve, reject) => {
    child.on('error', reject)
    child.on('close', (code) => resolve({ code, ...said }))
    meanwhile((signal) => child.kill(signal)).catch(reject)
  })
}
