import { closeSync, fsyncSync, openSync, writeSync } from 'node:fs'

/**
 * Writes a text to a file, down to the disk.
 *
 * @param flag 'w' replaces a file of that name, 'wx' refuses it
 */
export function writeWholeFile(path: string, text: string, flag: 'w' | 'wx'): void {
  const bytes = Buffer.from(text)
  const descriptor = openSync(path, flag)
  try {
    for (let written = 0; written < bytes.length; )
      written += writeSync(descriptor, bytes, written, bytes.length - written)
    fsyncSync(descriptor)
  } finally {
    closeSync(descriptor)
  }
}
