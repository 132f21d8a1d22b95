import { createHash } from 'node:crypto'
import type { Scene } from '../../model/experiments/runMember.ts'
import type { SolverStatistics } from '../../model/simulate.ts'

/** What a study keeps of a member. */
export type KeptResult =
  | {
      status: 'done'
      diagnostics: Record<string, number | null>
      scenes: Scene[]
      solver: SolverStatistics
    }
  | { status: 'failed'; reason: string }

/** One line of a file of members. */
export type MemberRecord =
  /** The first of every file: who wrote it. */
  | { kind: 'process'; node: string; platform: string }
  | { kind: 'member'; index: number; key: string; result: KeptResult }
  | { kind: 'crash'; index: number; key: string; reason: string }

const SUM_LENGTH = 16

function checksum(text: string): string {
  return createHash('sha256').update(text).digest('hex').slice(0, SUM_LENGTH)
}

/** The first digits of the SHA-256 of the JSON text, a space, the JSON text, a line feed. */
export function memberLine(record: MemberRecord): string {
  const text = JSON.stringify(record)
  return `${checksum(text)} ${text}\n`
}

export interface ReadLine {
  record: MemberRecord
  /** Equal records have equal sums. */
  sum: string
}

/** The way back, from a line without its line feed; null for one that is torn or damaged. */
export function readMemberLine(line: string): ReadLine | null {
  const sum = line.slice(0, SUM_LENGTH)
  const text = line.slice(SUM_LENGTH + 1)
  if (line[SUM_LENGTH] !== ' ' || checksum(text) !== sum) return null
  return { record: JSON.parse(text), sum }
}
