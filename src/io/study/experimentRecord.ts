import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import type { ModelIdentity } from '../modelIdentity.ts'

const EXPERIMENT_FORMAT = 'mesofrost-experiment'
const EXPERIMENT_FILE = 'experiment.json'

/** `experiment.json`: what was asked and what came out, in short. */
export interface ExperimentRecord {
  format: typeof EXPERIMENT_FORMAT
  formatVersion: 1
  kind: string
  identity: { model: ModelIdentity; node: string; platform: string }
  /** What was asked. */
  asked: Record<string, unknown>
  /** What came out. */
  found: Record<string, unknown>
}

export function writeExperimentRecord(
  directory: string,
  kind: string,
  { model, asked, found }: Pick<ExperimentRecord, 'asked' | 'found'> & { model: ModelIdentity },
): void {
  const platform = `${process.platform}-${process.arch}`
  const record: ExperimentRecord = {
    format: EXPERIMENT_FORMAT,
    formatVersion: 1,
    kind,
    identity: { model, node: process.version, platform },
    asked,
    found,
  }
  writeFileSync(join(directory, EXPERIMENT_FILE), `${JSON.stringify(record, null, 2)}\n`)
}

/** Whether a directory holds the output of an experiment of ours. */
export function holdsExperiment(directory: string): boolean {
  try {
    const record = JSON.parse(readFileSync(join(directory, EXPERIMENT_FILE), 'utf8'))
    return record?.format === EXPERIMENT_FORMAT
  } catch {
    return false
  }
}
