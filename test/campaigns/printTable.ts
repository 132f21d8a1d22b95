import { textTable } from '../../src/io/textTable.ts'

/** Prints rows under their column names, each row a record with the same keys. */
export function printTable(title: string, rows: Record<string, string | number>[]): void {
  if (rows.length === 0) return
  const names = Object.keys(rows[0])
  const columns = names.map((name) => ({ name, values: rows.map((row) => row[name]) }))
  console.log(`\n${title}\n${textTable(columns as Parameters<typeof textTable>[0])}`)
}

/** A share as per cent with so many significant digits. */
export function percent(share: number, digits = 2): string {
  return `${Number((100 * share).toPrecision(digits))} %`
}
