import { InputError } from '../../model/errors.ts'
import type { SceneTable } from './sceneTable.ts'

interface CsvRow {
  line: number
  fields: string[]
}

/** A field in quotes, in which a doubled quote stands for one, or a plain one; and what ends it. */
const FIELD = /\s*(?:"((?:[^"]|"")*)"\s*|([^,]*))(,|$)/y

/**
 * A table of scenes from comma-separated text with a header line. Empty lines and lines that begin with # are skipped;
 * every row has as many fields as the header.
 *
 * @param name how messages call the file
 */
export function csvSceneTable(text: string, name: string): SceneTable {
  const [header, ...rows] = text
    .split(/\r\n|\n|\r/)
    .map((content, i) => ({ content: content.trim(), line: i + 1 }))
    .filter(({ content }) => content !== '' && !content.startsWith('#'))
    .map(({ content, line }): CsvRow => ({ line, fields: fieldsOf(content) }))
  if (header === undefined || rows.length === 0)
    throw new InputError(`${name}: no rows; allowed: a header line and one line per scene`)
  const names = header.fields
  names.forEach((column, i) => {
    if (names.indexOf(column) < i)
      throw new InputError(`${name}:${header.line}: column ${column} stands there twice`)
  })
  for (const { line, fields } of rows)
    if (fields.length !== names.length)
      throw new InputError(
        `${name}:${line}: ${fields.length} fields; allowed: ${names.length}, as in the header`,
      )
  return {
    name,
    columns: new Map(names.map((column, i) => [column, rows.map(({ fields }) => fields[i])])),
    placeOf: (row) => `${name}:${rows[row]?.line ?? header.line}`,
  }
}

function fieldsOf(line: string): string[] {
  const fields: string[] = []
  FIELD.lastIndex = 0
  for (let end = ','; end === ','; ) {
    const match = FIELD.exec(line)
    // A quote that nothing closes: the rest of the line is taken as it stands.
    if (match === null) return line.split(',').map((field) => field.trim())
    fields.push(match[1]?.replaceAll('""', '"') ?? match[2].trim())
    end = match[3]
  }
  return fields
}
