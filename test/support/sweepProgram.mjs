/**
 * The compiled program with another worker: every thread of it ends in a way of its own now and then, by the chance
 * that MESOFROST_TEST_CRASHES gives.
 */
import { fileURLToPath } from 'node:url'
import { commandLine } from '../../dist/src/io/commandLine.js'
import { readModelIdentity } from '../../dist/src/io/modelIdentity.js'
import { watchStopSignals } from '../../dist/src/io/stopSignals.js'

process.exitCode = await commandLine(process.argv.slice(2), {
  terminal: {
    stdout: process.stdout,
    stderr: process.stderr,
    workingDirectory: process.cwd(),
    calledAs: 'mesofrost',
  },
  scenarioDirectory: fileURLToPath(new URL('../../scenarios', import.meta.url)),
  memberWorker: fileURLToPath(new URL('./crashingWorker.mjs', import.meta.url)),
  identity: readModelIdentity(fileURLToPath(new URL('../../dist', import.meta.url))),
  watchStopSignals,
})
