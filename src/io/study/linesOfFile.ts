import { closeSync, openSync, readSync } from 'node:fs'

export interface FileLine {
  /** Without the line feed. */
  bytes: Buffer
  /** Where it begins in the file. */
  offset: number
  /** Whether a line feed ends it: the last line of a file that is being written, or was torn, has none. */
  isWhole: boolean
}

const CHUNK_BYTES = 1 << 18
const LINE_FEED = 10

/** The lines of a file one after the other, whatever its length. */
export function* linesOfFile(path: string): Generator<FileLine> {
  const descriptor = openSync(path, 'r')
  try {
    let rest = Buffer.alloc(0)
    let restOffset = 0
    const chunk = Buffer.alloc(CHUNK_BYTES)
    for (;;) {
      const count = readSync(descriptor, chunk, 0, CHUNK_BYTES, null)
      if (count === 0) break
      const bytes = Buffer.concat([rest, chunk.subarray(0, count)])
      let start = 0
      for (let end = bytes.indexOf(LINE_FEED); end !== -1; end = bytes.indexOf(LINE_FEED, start)) {
        yield { bytes: bytes.subarray(start, end), offset: restOffset + start, isWhole: true }
        start = end + 1
      }
      rest = bytes.subarray(start)
      restOffset += start
    }
    if (rest.length > 0) yield { bytes: rest, offset: restOffset, isWhole: false }
  } finally {
    closeSync(descriptor)
  }
}
