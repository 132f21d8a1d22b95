import { closeSync, existsSync, openSync, readdirSync, readSync } from 'node:fs'
import { join } from 'node:path'
import { InputError } from '../../model/errors.ts'
import { linesOfFile } from './linesOfFile.ts'
import { MEMBER_FILE_ENDING } from './memberFile.ts'
import { type KeptResult, type ReadLine, readMemberLine } from './memberLine.ts'

/** Where a finished member's line lies. */
interface LinePlace {
  path: string
  offset: number
  length: number
  sum: string
}

export interface FoundMembers {
  /** By place in the design. */
  finished: Map<number, LinePlace>
  /** Members that took a thread or a process with them, how often, and why the last time. */
  crashes: Map<number, { count: number; reason: string }>
  /** Node version and platform of every process that wrote. */
  writers: Set<string>
  /** Lines, other than a torn last one, that cannot be read; their members count as missing. */
  damagedLines: number
}

/** Reads what is there of the members of a study, without holding their results. Writers may be at work meanwhile. */
export function findMembers(directory: string): FoundMembers {
  const found: FoundMembers = {
    finished: new Map(),
    crashes: new Map(),
    writers: new Set(),
    damagedLines: 0,
  }
  if (!existsSync(directory)) return found
  const files = readdirSync(directory).filter((name) => name.endsWith(MEMBER_FILE_ENDING))
  for (const path of files.sort().map((name) => join(directory, name)))
    for (const { bytes, offset, isWhole } of linesOfFile(path)) {
      if (!isWhole) continue
      const line = readMemberLine(bytes.toString())
      if (line === null) found.damagedLines++
      else note(found, line, { path, offset, length: bytes.length, sum: line.sum })
    }
  return found
}

function note(found: FoundMembers, { record }: ReadLine, place: LinePlace): void {
  if (record.kind === 'process') {
    found.writers.add(`Node ${record.node} on ${record.platform}`)
  } else if (record.kind === 'crash') {
    const count = (found.crashes.get(record.index)?.count ?? 0) + 1
    found.crashes.set(record.index, { count, reason: record.reason })
  } else {
    const earlier = found.finished.get(record.index)
    if (earlier !== undefined && earlier.sum !== place.sum)
      throw new InputError(
        `member ${record.index} came out differently in ${earlier.path} and ${place.path}; equal results are promised for one Node version and architecture only. Move one of the two files away and start again`,
      )
    if (earlier === undefined) found.finished.set(record.index, place)
  }
}

/** The result of one finished member; null when it is not there. */
export function readMember(found: FoundMembers, index: number): KeptResult | null {
  const place = found.finished.get(index)
  if (place === undefined) return null
  const bytes = Buffer.alloc(place.length)
  const descriptor = openSync(place.path, 'r')
  try {
    readSync(descriptor, bytes, 0, place.length, place.offset)
  } finally {
    closeSync(descriptor)
  }
  const line = readMemberLine(bytes.toString())
  if (line?.record.kind !== 'member')
    throw new InputError(`${place.path} changed while it was read; start again`)
  return line.record.result
}
