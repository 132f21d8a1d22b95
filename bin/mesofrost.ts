#!/usr/bin/env node
import { fileURLToPath } from 'node:url'
import { commandLine } from '../src/io/commandLine.ts'
import { readModelIdentity } from '../src/io/modelIdentity.ts'
import { watchStopSignals } from '../src/io/stopSignals.ts'

// A reader that has seen enough closes the pipe: no reason to complain. Nobody to tell is no reason to stop.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error
  process.exit()
})
process.stderr.on('error', () => {})

const builtDirectory = fileURLToPath(new URL('..', import.meta.url))
process.exitCode = await commandLine(process.argv.slice(2), {
  terminal: {
    stdout: process.stdout,
    stderr: process.stderr,
    workingDirectory: process.cwd(),
    // Inside npm's scripts and npx the program is not on the user's path.
    calledAs: process.env.npm_command === undefined ? 'mesofrost' : 'npx mesofrost',
  },
  scenarioDirectory: fileURLToPath(new URL('../../scenarios', import.meta.url)),
  memberWorker: fileURLToPath(new URL('./memberWorker.js', import.meta.url)),
  identity: readModelIdentity(builtDirectory),
  watchStopSignals,
})
