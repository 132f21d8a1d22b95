import { deflateSync } from 'node:zlib'
import type { Colour } from './colourMap.ts'

const SIGNATURE = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a])
const INDEXED = 3
const BITS = 8

/** The check sum of PNG, the polynomial of ISO 3309. */
function checkSum(bytes: Buffer): number {
  let sum = 0xffffffff
  for (const byte of bytes) {
    sum ^= byte
    for (let bit = 0; bit < 8; bit++) sum = (sum >>> 1) ^ (sum & 1 ? 0xedb88320 : 0)
  }
  return (sum ^ 0xffffffff) >>> 0
}

function chunk(type: string, content: Buffer): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), content])
  const ends = Buffer.alloc(8)
  ends.writeUInt32BE(content.length, 0)
  ends.writeUInt32BE(checkSum(body), 4)
  return Buffer.concat([ends.subarray(0, 4), body, ends.subarray(4)])
}

function header(width: number, height: number): Buffer {
  const content = Buffer.alloc(13)
  content.writeUInt32BE(width, 0)
  content.writeUInt32BE(height, 4)
  content[8] = BITS
  content[9] = INDEXED
  return chunk('IHDR', content)
}

/**
 * A PNG image (ISO/IEC 15948) of at most 256 colours, of which the first is transparent.
 *
 * @param pixels colour number of every pixel, row by row from the top
 */
export function indexedPng(width: number, pixels: Uint8Array, palette: readonly Colour[]): Buffer {
  const height = pixels.length / width
  const rows = Buffer.alloc(height * (width + 1))
  for (let row = 0; row < height; row++)
    rows.set(pixels.subarray(row * width, (row + 1) * width), row * (width + 1) + 1)
  return Buffer.concat([
    SIGNATURE,
    header(width, height),
    chunk('PLTE', Buffer.from(palette.flat())),
    chunk('tRNS', Buffer.from([0])),
    chunk('IDAT', deflateSync(rows, { level: 9 })),
    chunk('IEND', Buffer.alloc(0)),
  ])
}
