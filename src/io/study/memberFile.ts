import { randomBytes } from 'node:crypto'
import { closeSync, fsyncSync, openSync, writeSync } from 'node:fs'
import { join } from 'node:path'
import { type MemberRecord, memberLine } from './memberLine.ts'

export const MEMBER_FILE_ENDING = '.jsonl'

/** How long a finished member may be in the hands of the operating system alone. */
const LONGEST_UNFLUSHED_MS = 2000

/** The file that this process, and no other, adds its finished members to. */
export interface MemberFile {
  /** The line is with the operating system at once, and on the disk after two seconds at most. */
  append(record: MemberRecord): void
  close(): void
}

/**
 * The file appears with its first line. After an error it takes no more lines, so that a torn one stays the last.
 */
export function openMemberFile(directory: string): MemberFile {
  let descriptor: number | null = null
  let flushing: NodeJS.Timeout | null = null
  let failure: unknown = null
  const guarded = (act: () => void) => {
    if (failure !== null) throw failure
    try {
      act()
    } catch (error) {
      failure = error
      throw error
    }
  }
  const flush = () => {
    flushing = null
    if (descriptor !== null) fsyncSync(descriptor)
  }
  const append = (record: MemberRecord) => {
    descriptor ??= openWithHead(directory)
    writeLine(descriptor, record)
    flushing ??= setTimeout(flushLater, LONGEST_UNFLUSHED_MS)
  }
  const flushLater = () => {
    try {
      guarded(flush)
    } catch {
      // The next line, or the end, tells.
    }
  }
  return {
    append: (record) => guarded(() => append(record)),
    close() {
      if (flushing !== null) clearTimeout(flushing)
      try {
        guarded(flush)
      } finally {
        if (descriptor !== null) closeSync(descriptor)
        descriptor = null
      }
    },
  }
}

function openWithHead(directory: string): number {
  const name = `${randomBytes(8).toString('hex')}${MEMBER_FILE_ENDING}`
  const descriptor = openSync(join(directory, name), 'wx')
  const platform = `${process.platform}-${process.arch}`
  writeLine(descriptor, { kind: 'process', node: process.version, platform })
  return descriptor
}

function writeLine(descriptor: number, record: MemberRecord): void {
  const bytes = Buffer.from(memberLine(record))
  for (let written = 0; written < bytes.length; )
    written += writeSync(descriptor, bytes, written, bytes.length - written)
}
