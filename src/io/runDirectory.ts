import { randomBytes } from 'node:crypto'
import {
  closeSync,
  existsSync,
  fsyncSync,
  lstatSync,
  mkdirSync,
  openSync,
  readdirSync,
  renameSync,
  rmdirSync,
  rmSync,
} from 'node:fs'
import { basename, dirname, join, resolve } from 'node:path'
import { InputError } from '../model/errors.ts'
import { findRunRecord } from './runRecord.ts'
import { holdsExperiment } from './study/experimentRecord.ts'

/** Where the output of a run shall go. */
export interface RunTarget {
  /** The directory asked for; null for the next free one of `runs/`. */
  out: string | null
  /** Whether an earlier run of the same place may be replaced. */
  force: boolean
  /** Name of the scenario; names the directory below `runs/`. */
  scenarioName: string
  /** Against which relative paths are meant. */
  workingDirectory: string
  /** Told where the files will grow, before that directory is made: a run killed at once leaves nothing unnamed. */
  announce?(partialPath: string): void
}

/** A directory in the making: nothing stands under the final name before `publish`. */
export interface RunDirectory {
  /** Where the files are written meanwhile. */
  partialPath: string
  /** Gives the directory its final name, which is returned. */
  publish(): string
}

/** A name that is safe as a directory: other characters than letters, digits, dot, dash, underscore become dashes. */
export function directoryName(scenarioName: string): string {
  return scenarioName.replace(/[^\p{L}\p{N}._-]+/gu, '-').replace(/^[.-]+|-+$/g, '') || 'run'
}

function isEmptyDirectory(path: string): boolean {
  return lstatSync(path).isDirectory() && readdirSync(path).length === 0
}

/** Whether anything, even a dangling link, has this name. What cannot be looked at fails when it is made. */
function isTaken(path: string): boolean {
  try {
    return lstatSync(path, { throwIfNoEntry: false }) !== undefined
  } catch {
    return false
  }
}

function isOurOutput(path: string): boolean {
  return findRunRecord(join(path, 'run.json')) !== null || holdsExperiment(path)
}

function refuseUnlessFree(path: string, force: boolean): void {
  if (!isTaken(path) || isEmptyDirectory(path)) return
  if (!force)
    throw new InputError(
      `${path} exists already; give another --out, or --force to replace an earlier run`,
    )
  if (!lstatSync(path).isDirectory() || !isOurOutput(path))
    throw new InputError(
      `${path} is not the output of a mesofrost run (no run.json of ours in it), so --force does not replace it`,
    )
}

/** The name with the next free number in a directory. */
export function nextFree(parent: string, name: string): string {
  const taken = existsSync(parent) ? readdirSync(parent) : []
  const numbers = taken.flatMap((entry) => {
    const number = entry.startsWith(`${name}-`) ? entry.slice(name.length + 1) : ''
    return /^\d{3,}$/.test(number) ? [Number(number)] : []
  })
  const number = Math.max(0, ...numbers) + 1
  return join(parent, `${name}-${String(number).padStart(3, '0')}`)
}

function syncDirectory(path: string): void {
  if (process.platform === 'win32') return
  const descriptor = openSync(path, 'r')
  try {
    fsyncSync(descriptor)
  } finally {
    closeSync(descriptor)
  }
}

function replace(partialPath: string, target: string): void {
  const aside = join(
    dirname(target),
    `.${basename(target)}.replaced-${randomBytes(4).toString('hex')}`,
  )
  renameSync(target, aside)
  try {
    renameSync(partialPath, target)
  } catch (error) {
    renameSync(aside, target)
    throw error
  }
  rmSync(aside, { recursive: true })
}

function publishAs(partialPath: string, target: string, force: boolean): string {
  syncDirectory(partialPath)
  refuseUnlessFree(target, force)
  if (!isTaken(target)) renameSync(partialPath, target)
  else if (isEmptyDirectory(target)) {
    rmdirSync(target)
    renameSync(partialPath, target)
  } else replace(partialPath, target)
  syncDirectory(dirname(target))
  return target
}

/** Step by step, because the recursive mkdir of Node never returns where the system makes no directories. */
function makeWithParents(path: string): void {
  if (existsSync(path)) return
  makeWithParents(dirname(path))
  try {
    mkdirSync(path)
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error
  }
}

/** With its parents; throws an InputError where that cannot be. */
export function makeDirectory(path: string): void {
  try {
    makeWithParents(path)
  } catch (error) {
    throw new InputError(`the directory ${path} cannot be made: ${(error as Error).message}`)
  }
}

/** Checks the target and makes the partial directory beside it; throws an InputError before anything is written. */
export function createRunDirectory(target: RunTarget): RunDirectory {
  const { out, force, workingDirectory } = target
  if (out !== null && out.trim() === '') throw new InputError('--out needs the name of a directory')
  const name = directoryName(target.scenarioName)
  const wanted = out === null ? null : resolve(workingDirectory, out)
  const parent = wanted === null ? resolve(workingDirectory, 'runs') : dirname(wanted)
  if (wanted !== null) refuseUnlessFree(wanted, force)
  makeDirectory(parent)
  const label = wanted === null ? name : basename(wanted)
  const partialPath = join(parent, `.${label}.partial-${randomBytes(4).toString('hex')}`)
  target.announce?.(partialPath)
  makeDirectory(partialPath)
  return {
    partialPath,
    publish: () => publishAs(partialPath, wanted ?? nextFree(parent, name), force),
  }
}
