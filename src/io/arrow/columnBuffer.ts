import { type Data, Field, FixedSizeList, Float64, makeData, Utf8 } from 'apache-arrow'
import type { TableField } from './tableField.ts'

export type ColumnValues = ArrayLike<number | string>

/** Rows of one column on their way into a batch. */
export interface ColumnBuffer {
  /** Sets `count` rows from row `first` of the values on, into rows from `at` on. */
  put(values: ColumnValues, first: number, count: number, at: number): void
  /** The first `rows` rows as Arrow data; valid until the next `put`. */
  take(rows: number): Data
}

/** NaN is stored as null. */
function numberBuffer(capacity: number): ColumnBuffer {
  const numbers = new Float64Array(capacity)
  const valid = new Uint8Array(Math.ceil(capacity / 8))
  return {
    put(values, first, count, at) {
      for (let row = 0; row < count; row++) {
        const value = values[first + row] as number
        const bit = 1 << ((at + row) & 7)
        const isNull = Number.isNaN(value)
        numbers[at + row] = isNull ? 0 : value
        if (isNull) valid[(at + row) >> 3] &= ~bit
        else valid[(at + row) >> 3] |= bit
      }
    },
    take(rows) {
      let present = 0
      for (let row = 0; row < rows; row++) present += (valid[row >> 3] >> (row & 7)) & 1
      const nullBitmap = maskedBitmap(valid, rows)
      const nullCount = rows - present
      return makeData({
        type: new Float64(),
        length: rows,
        nullCount,
        ...(nullCount > 0 ? { nullBitmap } : {}),
        data: numbers.subarray(0, rows),
      })
    },
  }
}

/** A copy of the bitmap with the bits past `rows` cleared, so that no row of an earlier batch shows through. */
function maskedBitmap(valid: Uint8Array, rows: number): Uint8Array {
  const bitmap = valid.slice(0, Math.ceil(rows / 8))
  if (rows & 7) bitmap[bitmap.length - 1] &= (1 << (rows & 7)) - 1
  return bitmap
}

function textBuffer(capacity: number): ColumnBuffer {
  const texts: string[] = new Array(capacity).fill('')
  return {
    put(values, first, count, at) {
      for (let row = 0; row < count; row++) texts[at + row] = values[first + row] as string
    },
    take(rows) {
      const encoded = texts.slice(0, rows).map((text) => new TextEncoder().encode(text))
      const valueOffsets = new Int32Array(rows + 1)
      encoded.forEach((bytes, row) => {
        valueOffsets[row + 1] = valueOffsets[row] + bytes.length
      })
      const data = new Uint8Array(valueOffsets[rows])
      encoded.forEach((bytes, row) => {
        data.set(bytes, valueOffsets[row])
      })
      return makeData({ type: new Utf8(), length: rows, nullCount: 0, valueOffsets, data })
    },
  }
}

function listBuffer(capacity: number, listLength: number): ColumnBuffer {
  const numbers = new Float64Array(capacity * listLength)
  const type = new FixedSizeList(listLength, new Field('item', new Float64(), false))
  return {
    put(values, first, count, at) {
      const from = first * listLength
      for (let i = 0; i < count * listLength; i++)
        numbers[at * listLength + i] = values[from + i] as number
    },
    take(rows) {
      const length = rows * listLength
      const data = numbers.subarray(0, length)
      const child = makeData({ type: new Float64(), length, nullCount: 0, data })
      return makeData({ type, length: rows, nullCount: 0, child })
    },
  }
}

export function columnBuffer(field: TableField, capacity: number): ColumnBuffer {
  if (field.listLength !== null) return listBuffer(capacity, field.listLength)
  return field.type === 'text' ? textBuffer(capacity) : numberBuffer(capacity)
}
