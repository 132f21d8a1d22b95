import { closeSync, fstatSync, openSync, readFileSync } from 'node:fs'
import { InputError } from '../../model/errors.ts'

const LARGEST_BYTES = 10 * 1024 * 1024

/**
 * The text of a file that the user named; an InputError says what is wrong with it otherwise.
 * @param name how messages call the file
 * @param what what it should be, such as 'scenario'
 */
export function readTextFile(path: string, name: string, what: string): string {
  const bytes = readBytes(path, `${what} ${name}`)
  if (bytes.length === 0) throw new InputError(`${what} ${name} is empty`)
  if (bytes.includes(0)) throw new InputError(`${what} ${name} is binary; allowed: UTF-8 text`)
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  } catch {
    throw new InputError(`${what} ${name} is not UTF-8 text`)
  }
}

function readBytes(path: string, subject: string): Buffer {
  let descriptor: number
  try {
    descriptor = openSync(path, 'r')
  } catch (error) {
    throw unreadable(error, subject)
  }
  try {
    const status = fstatSync(descriptor)
    if (status.isDirectory()) throw new InputError(`${subject} is a directory; allowed: a file`)
    if (!status.isFile()) throw new InputError(`${subject} is not a regular file`)
    if (status.size > LARGEST_BYTES) {
      const megabytes = (status.size / 1024 ** 2).toFixed(1)
      throw new InputError(`${subject} has ${megabytes} MB; allowed: up to 10 MB`)
    }
    return readFileSync(descriptor)
  } catch (error) {
    throw unreadable(error, subject)
  } finally {
    closeSync(descriptor)
  }
}

function unreadable(error: unknown, subject: string): unknown {
  const code = (error as NodeJS.ErrnoException).code
  if (code === undefined) return error
  if (code === 'ENOENT' || code === 'ENOTDIR') return new InputError(`${subject} does not exist`)
  if (code === 'EACCES') return new InputError(`${subject} may not be read`)
  return new InputError(`${subject} cannot be read (${code})`)
}
