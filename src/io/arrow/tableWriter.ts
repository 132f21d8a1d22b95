import { makeData, RecordBatch, type Schema, Struct } from 'apache-arrow'
import { ArrowFileWriter } from './arrowFileWriter.ts'
import { type ColumnBuffer, type ColumnValues, columnBuffer } from './columnBuffer.ts'
import { arrowSchema, type TableField, type TableMetadata } from './tableField.ts'

export interface TableShape {
  fields: TableField[]
  metadata: TableMetadata
  /** Every batch but the last holds exactly so many rows, however the rows come in. */
  rowsPerBatch: number
}

/** A table on disk that grows by rows. Equal rows give equal bytes; memory holds one batch. */
export class TableWriter {
  readonly #shape: TableShape
  readonly #schema: Schema
  readonly #file: ArrowFileWriter
  readonly #buffers: ColumnBuffer[]
  #rows = 0

  constructor(path: string, shape: TableShape) {
    this.#shape = shape
    this.#schema = arrowSchema(shape.fields, shape.metadata)
    this.#file = new ArrowFileWriter(path, this.#schema)
    this.#buffers = shape.fields.map((field) => columnBuffer(field, shape.rowsPerBatch))
  }

  /** Adds rows. `columns` holds, by field name, one value per row, or `listLength` values per row. */
  append(columns: Record<string, ColumnValues>, rows: number): void {
    this.#checkColumns(columns, rows)
    for (let first = 0; first < rows; ) {
      const count = Math.min(rows - first, this.#shape.rowsPerBatch - this.#rows)
      this.#shape.fields.forEach((field, i) => {
        this.#buffers[i].put(columns[field.name], first, count, this.#rows)
      })
      this.#rows += count
      first += count
      if (this.#rows === this.#shape.rowsPerBatch) this.#writeBatch()
    }
  }

  close(): void {
    if (this.#rows > 0) this.#writeBatch()
    this.#file.close()
  }

  /** Leaves the file as it is after writing has failed. */
  abandon(): void {
    this.#file.abandon()
  }

  #checkColumns(columns: Record<string, ColumnValues>, rows: number): void {
    for (const { name, listLength } of this.#shape.fields) {
      const wanted = rows * (listLength ?? 1)
      const given = columns[name]?.length
      if (given !== wanted)
        throw new Error(`column ${name} has ${given ?? 'no'} values where ${wanted} are due`)
    }
  }

  #writeBatch(): void {
    const children = this.#buffers.map((buffer) => buffer.take(this.#rows))
    const type = new Struct(this.#schema.fields)
    const rows = makeData({ type, length: this.#rows, nullCount: 0, children })
    this.#file.write(new RecordBatch(this.#schema, rows))
    this.#rows = 0
  }
}
