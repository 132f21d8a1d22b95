/**
 * Names the programs that the check of readers wants and that this machine lacks, and then exits with 2, so that what
 * could not be checked never counts as passed.
 */
import { spawnSync } from 'node:child_process'

const { status } = spawnSync('python3', ['-c', 'import pyarrow'], { stdio: 'ignore' })
if (status !== 0) {
  console.error('not checked: the Python reader, because python3 with pyarrow is missing')
  process.exitCode = 2
}
