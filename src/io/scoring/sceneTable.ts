import { InputError } from '../../model/errors.ts'
import { nearestWord } from '../../model/scenario/nearestWord.ts'
import { shownValue } from '../../model/scenario/validate.ts'

/** A table with one row per scene (or per draw of a scene) as it stands in a file; null where there is no value. */
export interface SceneTable {
  /** How messages call the file. */
  name: string
  columns: Map<string, (number | string | null)[]>
  /** How messages call a row: file and line, or file and row. */
  placeOf(row: number): string
}

export const SCENE_ID = 'scene_id'
/** Tells several observations of one scene apart. */
export const DRAW = 'draw'
export const UNCERTAINTY = '_uncertainty'
/** What says where and when a scene is, and is no result of a retrieval. */
const COORDINATES = [SCENE_ID, DRAW, 'member', 'time_h', 'time_s']
/** How tables write that there is no value, beside an empty field. */
const NOTHING = ['', 'nan', 'na', 'null', 'none']

/** The scenes by row. */
export function sceneIds(table: SceneTable): string[] {
  const names = [...table.columns.keys()]
  const ids = table.columns.get(SCENE_ID)
  if (ids === undefined) {
    const nearest = nearestWord(SCENE_ID, names)
    const hint = nearest === null ? '' : `; did you mean ${nearest}?`
    throw new InputError(
      `${table.placeOf(-1)}: no column ${SCENE_ID}; columns there: ${names.join(', ')}${hint}`,
    )
  }
  if (ids.length === 0) throw new InputError(`${table.name}: no rows; allowed: one row per scene`)
  return ids.map((id, row) => {
    if (id !== null && id !== '') return String(id)
    throw new InputError(`${table.placeOf(row)}: column ${SCENE_ID} is empty`)
  })
}

/** The draws by row; null for a table that knows none. */
export function drawsOf(table: SceneTable): string[] | null {
  return table.columns.get(DRAW)?.map(String) ?? null
}

function isNothing(field: number | string | null): boolean {
  if (field === null) return true
  return typeof field === 'number'
    ? Number.isNaN(field)
    : NOTHING.includes(field.trim().toLowerCase())
}

function numberOf(field: number | string): number {
  return typeof field === 'number' ? field : Number(field)
}

/** Names of the columns that hold results: numbers, at least one, and no uncertainties. */
export function quantityNames({ columns }: SceneTable): string[] {
  return [...columns].flatMap(([name, fields]) => {
    if (COORDINATES.includes(name) || name.endsWith(UNCERTAINTY)) return []
    const isResult = fields.some(
      (field) => field !== null && !isNothing(field) && Number.isFinite(numberOf(field)),
    )
    return isResult ? [name] : []
  })
}

/**
 * The numbers of a column by row, NaN where there is none and all NaN without such a column.
 * @param least the least number that is allowed
 */
export function numbersOf(table: SceneTable, column: string, least = -Infinity): Float64Array {
  const fields = table.columns.get(column) ?? sceneIds(table).fill('')
  return Float64Array.from(fields, (field, row) => {
    if (field === null || isNothing(field)) return Number.NaN
    const value = numberOf(field)
    if (Number.isFinite(value) && value >= least) return value
    const allowed = least === -Infinity ? 'a number' : `a number from ${least} on`
    throw new InputError(
      `${table.placeOf(row)}: column ${column}: ${shownValue(field)} is not allowed; allowed: ${allowed}, or nothing where there is none`,
    )
  })
}
