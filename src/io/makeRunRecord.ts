import type { Column } from '../model/state/column.ts'
import type { RunningSummary } from './columnModel.ts'
import { RUN_FORMAT, type RunRecord } from './runRecord.ts'
import type { RunRequest } from './runScenario.ts'

export interface RunEnding {
  status: RunRecord['status']
  identity: string
  summary: RunningSummary
  solver: unknown
  failure: string | null
  notices: string[]
  startedAt: Date
}

function seedsOf(document: RunRequest['loaded']['document']): Record<string, number> {
  return document.random_waves === undefined ? {} : { random_waves: document.random_waves.seed }
}

export function makeRunRecord(request: RunRequest, column: Column, ending: RunEnding): RunRecord {
  const { loaded, target, from } = request
  const { numbers, warnings } = ending.summary.result()
  const finishedAt = new Date()
  return {
    format: RUN_FORMAT,
    formatVersion: 1,
    status: ending.status,
    name: target.scenarioName,
    title: loaded.scenario.title,
    scenario: loaded.document,
    identity: {
      run: ending.identity,
      model: request.identity,
      node: process.version,
      platform: `${process.platform}-${process.arch}`,
    },
    continuedFrom: from && { directory: from.directory, time_h: from.saved.snapshot.time_s / 3600 },
    seeds: seedsOf(loaded.document),
    breakPoints_h: column.atmosphere.breakPoints_s.map((time_s) => time_s / 3600),
    solver: ending.solver,
    warnings: [...loaded.warnings, ...warnings, ...ending.notices],
    summary: numbers,
    failure: ending.failure,
    startedAt: ending.startedAt.toISOString(),
    finishedAt: finishedAt.toISOString(),
    wallClock_s: (finishedAt.getTime() - ending.startedAt.getTime()) / 1000,
  }
}
