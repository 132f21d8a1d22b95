import { createHash, randomBytes } from 'node:crypto'
import { linkSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { InputError } from '../../model/errors.ts'
import type { Study } from '../../model/experiments/study.ts'
import type { ScenarioDocument } from '../../model/scenario/schema.ts'
import { canonicalJson } from '../canonicalJson.ts'
import type { ModelIdentity } from '../modelIdentity.ts'
import { writeWholeFile } from '../writeWholeFile.ts'

export const STUDY_FORMAT = 'mesofrost-study'
export const STUDY_FILE = 'study.json'

/** `study.json`: what a study directory is the study of. Its members are those of this design and no other. */
export interface StudyRecord {
  format: typeof STUDY_FORMAT
  formatVersion: 1
  name: string
  study: Study
  /** The complete scenario that the study starts from, every file's content inlined. */
  base: ScenarioDocument
  model: ModelIdentity
}

/** The parts that decide what the members are; names and titles do not. */
function design({ study, base, model }: StudyRecord): Record<string, unknown> {
  const { title: _study, question: _asked, base: _path, ...plan } = study
  const { title: _title, question: _question, origin: _origin, ...scenario } = base
  return { 'the study': plan, 'the scenario it starts from': scenario, 'the program': model }
}

/** SHA-256, hexadecimal, of the design and the program. */
export function studyIdentity(record: StudyRecord): string {
  return createHash('sha256')
    .update(canonicalJson(design(record)))
    .digest('hex')
}

/** In which part two studies differ; null when they are the same. */
export function differenceOf(one: StudyRecord, other: StudyRecord): string | null {
  const others = design(other)
  const different = Object.entries(design(one)).find(
    ([part, content]) => canonicalJson(content) !== canonicalJson(others[part]),
  )
  return different?.[0] ?? null
}

/** The study of a directory; null where there is none. */
export function findStudyRecord(directory: string): StudyRecord | null {
  let text: string
  try {
    text = readFileSync(join(directory, STUDY_FILE), 'utf8')
  } catch {
    return null
  }
  try {
    const record = JSON.parse(text)
    return record?.format === STUDY_FORMAT ? record : null
  } catch {
    return null
  }
}

export function readStudyRecord(directory: string): StudyRecord {
  const record = findStudyRecord(directory)
  if (record === null)
    throw new InputError(
      `${directory} is not a study directory: it holds no study.json of mesofrost`,
    )
  return record
}

/** Names beside which study.json is being made by some process. */
export const STUDY_FILE_PARTIAL = `.${STUDY_FILE}.partial-`

/**
 * Creates study.json unless there is one: of many processes that try at once, one succeeds, and no process ever sees
 * half a file. Returns whether it was this one.
 */
export function createStudyRecord(directory: string, record: StudyRecord): boolean {
  const text = `${JSON.stringify(record, null, 2)}\n`
  const partial = join(directory, STUDY_FILE_PARTIAL + randomBytes(4).toString('hex'))
  const path = join(directory, STUDY_FILE)
  try {
    writeWholeFile(partial, text, 'wx')
    linkSync(partial, path)
    return true
  } catch (error) {
    const { code = '' } = error as NodeJS.ErrnoException
    if (code === 'EEXIST') return false
    if (!WITHOUT_LINKS.includes(code)) throw error
    return createWithoutLink(path, text)
  } finally {
    rmSync(partial, { force: true })
  }
}

/** What file systems say that know no links. */
const WITHOUT_LINKS = ['EPERM', 'ENOSYS', 'ENOTSUP', 'EOPNOTSUPP']

function createWithoutLink(path: string, text: string): boolean {
  try {
    writeWholeFile(path, text, 'wx')
    return true
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST') return false
    throw error
  }
}
