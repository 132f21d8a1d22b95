import { DataType, type Field, tableFromIPC, type Vector } from 'apache-arrow'
import { InputError } from '../../model/errors.ts'
import type { SceneTable } from './sceneTable.ts'

const FILE_MAGIC = 'ARROW1'
/** How the stream form begins. */
const STREAM_MARK = 0xffffffff

/** Whether these bytes are an Arrow table, as a file or as a stream. */
export function looksLikeArrow(bytes: Buffer): boolean {
  if (bytes.subarray(0, FILE_MAGIC.length).toString('latin1') === FILE_MAGIC) return true
  return bytes.length > 4 && bytes.readUInt32LE(0) === STREAM_MARK
}

/**
 * A table of scenes from Arrow bytes of any program: whole or floating-point numbers of any width, texts plain or as
 * a dictionary; columns of other kinds are left out.
 *
 * @param name how messages call the file
 */
export function arrowSceneTable(bytes: Buffer, name: string): SceneTable {
  const isFile = bytes.subarray(0, FILE_MAGIC.length).toString('latin1') === FILE_MAGIC
  if (isFile && bytes.subarray(-FILE_MAGIC.length).toString('latin1') !== FILE_MAGIC)
    throw new InputError(`${name} is cut off, so it cannot be read`)
  const columns = new Map(
    tableOf(bytes, name).flatMap(([field, vector]) => {
      const read = cellReader(field.type)
      return read === null ? [] : [[field.name, Array.from(vector, read)] as const]
    }),
  )
  return { name, columns, placeOf: (row) => (row < 0 ? name : `${name}: row ${row + 1}`) }
}

function tableOf(bytes: Buffer, name: string): [Field, Vector][] {
  try {
    const table = tableFromIPC(bytes)
    return table.schema.fields.map((field, i) => [field, table.getChildAt(i) as Vector])
  } catch (error) {
    throw new InputError(`${name} cannot be read as an Arrow table: ${(error as Error).message}`)
  }
}

type CellReader = (cell: unknown) => number | string | null

function cellReader(type: DataType): CellReader | null {
  const plain = DataType.isDictionary(type) ? type.dictionary : type
  if (DataType.isUtf8(plain) || DataType.isLargeUtf8(plain))
    return (cell) => (cell === null ? null : String(cell))
  if (DataType.isInt(plain) || DataType.isFloat(plain))
    return (cell) => (cell === null ? null : Number(cell))
  return null
}
