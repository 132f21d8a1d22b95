import { basename, extname } from 'node:path'

/** The name of a file without directory and ending. */
export function fileStem(path: string): string {
  return basename(path, extname(path))
}
