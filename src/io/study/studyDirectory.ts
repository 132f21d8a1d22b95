import { randomBytes } from 'node:crypto'
import { existsSync, lstatSync, mkdirSync, readdirSync, renameSync, rmSync } from 'node:fs'
import { basename, dirname, join, resolve } from 'node:path'
import { InputError } from '../../model/errors.ts'
import { makeDirectory, nextFree } from '../runDirectory.ts'
import {
  createStudyRecord,
  differenceOf,
  findStudyRecord,
  STUDY_FILE,
  STUDY_FILE_PARTIAL,
  type StudyRecord,
} from './studyRecord.ts'

/** Where a study shall go, or go on. */
export interface StudyTarget {
  /** The directory asked for; null for the next free one of `runs/`. */
  out: string | null
  /** Whether a study that lies there is thrown away first. */
  force: boolean
  /** Against which relative paths are meant. */
  workingDirectory: string
}

export interface StudyDirectory {
  path: string
  /** Where the processes of the study put their members. */
  membersPath: string
}

const MEMBERS = 'members'

export function studyDirectoryAt(path: string): StudyDirectory {
  return { path, membersPath: join(path, MEMBERS) }
}

/** What may stand in the directory of a study that another process is just beginning. */
function isOfBeginning(name: string): boolean {
  return name === MEMBERS || name.startsWith(STUDY_FILE_PARTIAL)
}

function refuseStranger(path: string): void {
  if (!lstatSync(path).isDirectory()) throw new InputError(`${path} is not a directory`)
  if (existsSync(join(path, STUDY_FILE))) {
    if (findStudyRecord(path) === null)
      throw new InputError(`${join(path, STUDY_FILE)} is not a record of a mesofrost study`)
    return
  }
  if (readdirSync(path).every(isOfBeginning)) return
  throw new InputError(`${path} holds something else than a study; give another --out`)
}

function throwAway(path: string): void {
  if (findStudyRecord(path) === null) return
  const aside = join(dirname(path), `.${basename(path)}.replaced-${randomBytes(4).toString('hex')}`)
  renameSync(path, aside)
  rmSync(aside, { recursive: true })
}

function directoryAskedFor({ out, force, workingDirectory }: StudyTarget): string | null {
  if (out === null) return null
  if (out.trim() === '') throw new InputError('--out needs the name of a directory')
  const path = resolve(workingDirectory, out)
  if (!existsSync(path)) return path
  refuseStranger(path)
  if (force) throwAway(path)
  return path
}

/** Of several processes that want the next number at once, each gets its own. */
function makeNextFree(name: string, workingDirectory: string): string {
  const parent = resolve(workingDirectory, 'runs')
  makeDirectory(parent)
  for (;;) {
    const path = nextFree(parent, name)
    try {
      mkdirSync(path)
      return path
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error
    }
  }
}

/** Begins a study in its directory, or goes on with it; refuses a directory that belongs to anything else. */
export function openStudyDirectory(target: StudyTarget, record: StudyRecord): StudyDirectory {
  const path = directoryAskedFor(target) ?? makeNextFree(record.name, target.workingDirectory)
  const directory = studyDirectoryAt(path)
  makeDirectory(path)
  if (!existsSync(join(path, STUDY_FILE))) createStudyRecord(path, record)
  const standing = findStudyRecord(path)
  const difference = standing === null ? 'study.json' : differenceOf(standing, record)
  if (difference !== null)
    throw new InputError(
      `${path} belongs to another study: ${difference} differs; give another --out, or --force to throw that study away`,
    )
  makeDirectory(directory.membersPath)
  return directory
}
