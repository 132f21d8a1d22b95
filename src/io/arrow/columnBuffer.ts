import { type Data, Field, FixedSizeList, Float64, makeData, Utf8 } from 'apache-arrow'
import type { TableField } from './tableField.ts'

/** NaN among numbers and null among texts become null. */
export type ColumnValues = ArrayLike<number | string | null>

/** Rows of one column on their way into a batch. */
export interface ColumnBuffer {
  /** Sets `count` rows from row `first` of the values on, into rows from `at` on. */
  put(values: ColumnValues, first: number, count: number, at: number): void
  /** The first `rows` rows as Arrow data; valid until the next `put`. */
  take(rows: number): Data
}

/** Which of the rows on their way have a value. */
function validity(capacity: number) {
  const bits = new Uint8Array(Math.ceil(capacity / 8))
  return {
    set(row: number, isValid: boolean) {
      const bit = 1 << (row & 7)
      if (isValid) bits[row >> 3] |= bit
      else bits[row >> 3] &= ~bit
    },
    /** As Arrow wants it; without a bitmap where nothing is null. */
    take(rows: number): { nullCount: number; nullBitmap?: Uint8Array } {
      let present = 0
      for (let row = 0; row < rows; row++) present += (bits[row >> 3] >> (row & 7)) & 1
      const nullCount = rows - present
      return nullCount === 0 ? { nullCount } : { nullCount, nullBitmap: maskedBitmap(bits, rows) }
    },
  }
}

function numberBuffer(capacity: number): ColumnBuffer {
  const numbers = new Float64Array(capacity)
  const valid = validity(capacity)
  return {
    put(values, first, count, at) {
      for (let row = 0; row < count; row++) {
        const value = values[first + row] as number
        const isNull = Number.isNaN(value)
        numbers[at + row] = isNull ? 0 : value
        valid.set(at + row, !isNull)
      }
    },
    take: (rows) =>
      makeData({
        type: new Float64(),
        length: rows,
        ...valid.take(rows),
        data: numbers.subarray(0, rows),
      }),
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
  const valid = validity(capacity)
  return {
    put(values, first, count, at) {
      for (let row = 0; row < count; row++) {
        const value = values[first + row] as string | null
        texts[at + row] = value ?? ''
        valid.set(at + row, value !== null)
      }
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
      return makeData({
        type: new Utf8(),
        length: rows,
        ...valid.take(rows),
        valueOffsets,
        data,
      })
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
