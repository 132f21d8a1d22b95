import { InputError } from '../../model/errors.ts'
import { nearestWord } from '../../model/scenario/nearestWord.ts'
import { shownValue } from '../../model/scenario/validate.ts'

/** Numbers of one named column, and the line of the file that each row stands on. */
export interface CsvColumns {
  columns: number[][]
  lines: number[]
}

interface CsvRow {
  line: number
  fields: string[]
}

/**
 * Named columns of comma-separated text with a header line. Empty lines and lines that begin with # are skipped;
 * columns not asked for are ignored, but every row has as many fields as the header.
 * @param name how messages call the file
 */
export function csvColumns(text: string, name: string, wanted: readonly string[]): CsvColumns {
  const [header, ...rows] = rowsOf(text)
  if (header === undefined || rows.length === 0) {
    throw new InputError(`${name}: no rows; allowed: a header line and one line per value`)
  }
  const indices = wanted.map((column) => columnIndex(header, name, column))
  for (const { line, fields } of rows) {
    if (fields.length !== header.fields.length) {
      throw new InputError(
        `${name}:${line}: ${fields.length} fields; allowed: ${header.fields.length}, as in the header`,
      )
    }
  }
  return {
    columns: indices.map((index, i) =>
      rows.map(({ line, fields }) =>
        numberOf(fields[index], `${name}:${line}: column ${wanted[i]}`),
      ),
    ),
    lines: rows.map(({ line }) => line),
  }
}

function rowsOf(text: string): CsvRow[] {
  return text
    .split(/\r\n|\n|\r/)
    .map((content, i) => ({ content: content.trim(), line: i + 1 }))
    .filter(({ content }) => content !== '' && !content.startsWith('#'))
    .map(({ content, line }) => ({ line, fields: content.split(',').map(unquoted) }))
}

function unquoted(field: string): string {
  return field.trim().replace(/^"(.*)"$/, '$1')
}

function columnIndex({ fields, line }: CsvRow, name: string, column: string): number {
  const index = fields.indexOf(column)
  if (index >= 0) {
    if (fields.indexOf(column, index + 1) < 0) return index
    throw new InputError(`${name}:${line}: column ${column} stands there twice`)
  }
  const nearest = nearestWord(column, fields)
  const hint = nearest === null ? '' : `; did you mean ${nearest}?`
  throw new InputError(
    `${name}:${line}: no column ${column}; columns there: ${fields.join(', ')}${hint}`,
  )
}

function numberOf(field: string, where: string): number {
  const value = Number(field)
  if (field !== '' && Number.isFinite(value)) return value
  throw new InputError(`${where}: ${shownValue(field)} is not allowed; allowed: a number`)
}
