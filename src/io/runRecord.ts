import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { InputError } from '../model/errors.ts'
import type { ScenarioDocument } from '../model/scenario/schema.ts'
import type { ModelIdentity } from './modelIdentity.ts'
import { writeWholeFile } from './writeWholeFile.ts'

export const RUN_FORMAT = 'mesofrost-run'

/** `run.json`: what was run, by which program, and how it went. The only output file that knows the clock. */
export interface RunRecord {
  format: typeof RUN_FORMAT
  formatVersion: 1
  /** Only a finished run has a final directory; the others name the partial one they left. */
  status: 'finished' | 'interrupted' | 'failed'
  name: string
  title: string
  /** The complete scenario as one may write it: every default filled in, every file's content inlined. */
  scenario: ScenarioDocument
  identity: { run: string; model: ModelIdentity; node: string; platform: string }
  /** The saved state that the run went on from, which is the first of its own state.arrow; null at the start. */
  continuedFrom: { directory: string; time_h: number } | null
  seeds: Record<string, number>
  breakPoints_h: number[]
  solver: unknown
  warnings: string[]
  summary: Record<string, number | null>
  /** What stopped the run, when it did not finish. */
  failure: string | null
  startedAt: string
  finishedAt: string
  wallClock_s: number
}

export function writeRunRecord(directory: string, record: RunRecord): void {
  writeWholeFile(join(directory, 'run.json'), `${JSON.stringify(record, null, 2)}\n`, 'w')
}

/** The run record in a file; null when the file holds something else. */
export function findRunRecord(path: string): RunRecord | null {
  try {
    const record = JSON.parse(readFileSync(path, 'utf8'))
    return record?.format === RUN_FORMAT ? record : null
  } catch {
    return null
  }
}

export function readRunRecord(directory: string): RunRecord {
  const record = findRunRecord(join(directory, 'run.json'))
  if (record === null)
    throw new InputError(
      `${directory} is not a run directory: it holds no run.json of mesofrost${otherTables(directory)}`,
    )
  return record
}

/** The tables of an experiment, which may be what the user looks for. */
function otherTables(directory: string): string {
  const tables = existsSync(directory)
    ? readdirSync(directory).filter((name) => name.endsWith('.arrow'))
    : []
  return tables.length === 0
    ? ''
    : `; it does hold ${tables.join(', ')}, each to be named by itself`
}
