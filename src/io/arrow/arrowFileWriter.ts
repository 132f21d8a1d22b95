import { closeSync, fsyncSync, openSync, writeSync } from 'node:fs'
import { Message, RecordBatchFileWriter, type Schema } from 'apache-arrow'

const BUFFER_BYTES = 1 << 18

function writeFully(descriptor: number, bytes: Uint8Array): void {
  for (let written = 0; written < bytes.byteLength; )
    written += writeSync(descriptor, bytes, written, bytes.byteLength - written)
}

/**
 * Writes an Arrow IPC file as it grows. The library's own writer queues everything in memory when the disk is slow, and
 * leaves out the schema message that has to stand before the first batch, so that the content cannot be read as a
 * stream. This one writes at once and includes the message.
 */
export class ArrowFileWriter extends RecordBatchFileWriter {
  readonly #descriptor: number
  readonly #buffer = new Uint8Array(BUFFER_BYTES)
  #buffered = 0
  #open = true

  constructor(path: string, schema: Schema) {
    super()
    this.#descriptor = openSync(path, 'wx')
    this.reset(undefined, schema)
  }

  protected override _write(chunk: ArrayBufferView): this {
    if (!this._started) return this
    const bytes = new Uint8Array(chunk.buffer, chunk.byteOffset, chunk.byteLength)
    if (bytes.byteLength > BUFFER_BYTES - this.#buffered) this.#flush()
    if (bytes.byteLength > BUFFER_BYTES) writeFully(this.#descriptor, bytes)
    else {
      this.#buffer.set(bytes, this.#buffered)
      this.#buffered += bytes.byteLength
    }
    this._position += bytes.byteLength
    return this
  }

  protected override _writeSchema(schema: Schema): this {
    super._writeSchema(schema)
    return this._writeMessage(Message.from(schema))
  }

  #flush(): void {
    const bytes = this.#buffer.subarray(0, this.#buffered)
    this.#buffered = 0
    writeFully(this.#descriptor, bytes)
  }

  /** Writes the footer, brings everything to the disk and closes the file. Does nothing when closed already. */
  override close(): void {
    if (!this.#open) return
    this.#open = false
    try {
      super.close()
      this.#flush()
      fsyncSync(this.#descriptor)
    } finally {
      closeSync(this.#descriptor)
    }
  }

  /** Closes the file as it is, unreadable: for when writing has failed. */
  abandon(): void {
    if (!this.#open) return
    this.#open = false
    closeSync(this.#descriptor)
  }
}
