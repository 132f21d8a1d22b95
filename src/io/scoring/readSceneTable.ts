import { readFileSync, statSync } from 'node:fs'
import { resolve } from 'node:path'
import { InputError } from '../../model/errors.ts'
import { readTextFile } from '../scenario/readTextFile.ts'
import { arrowSceneTable, looksLikeArrow } from './arrowSceneTable.ts'
import { csvSceneTable } from './csvSceneTable.ts'
import type { SceneTable } from './sceneTable.ts'

/**
 * A table of scenes from a file, Arrow or comma-separated text, whatever its name ends in.
 *
 * @param name the path as the user typed it, which is how messages call the file
 * @param what what it should be, such as 'estimates'
 */
export function readSceneTable(name: string, what: string, workingDirectory: string): SceneTable {
  const path = resolve(workingDirectory, name)
  const bytes = bytesOrNothing(path)
  if (bytes !== null && looksLikeArrow(bytes)) return arrowSceneTable(bytes, name)
  if (bytes?.includes(0) === true)
    throw new InputError(`${what} ${name} is binary; allowed: an Arrow table or CSV text`)
  return csvSceneTable(readTextFile(path, name, what), name)
}

/** Null for what is no readable file; reading it as text says what is wrong. */
function bytesOrNothing(path: string): Buffer | null {
  try {
    return statSync(path).isFile() ? readFileSync(path) : null
  } catch {
    return null
  }
}
