/** A column to be shown: a name and its values, NaN where there is none. */
export interface ShownColumn {
  name: string
  values: ArrayLike<number | string>
}

const DIGITS = 6
const GAP = '  '

const PLAIN_FROM = 1e-4
const PLAIN_BELOW = 1e7

/** A number with six significant digits and no trailing zeros, in powers of ten where it is long; empty for NaN. */
export function shortNumber(value: number): string {
  if (Number.isNaN(value)) return ''
  const rounded = Number(value.toPrecision(DIGITS))
  const size = Math.abs(rounded)
  const isPlain = size === 0 || !Number.isFinite(size) || (size >= PLAIN_FROM && size < PLAIN_BELOW)
  return isPlain ? String(rounded) : rounded.toExponential().replace('e+', 'e')
}

function cell(value: number | string): string {
  return typeof value === 'number' ? shortNumber(value) : value
}

/** The columns side by side under their names; numbers right-aligned, texts left-aligned. */
export function textTable(columns: ShownColumn[]): string {
  const blocks = columns.map(({ name, values }) => {
    const isText = typeof values[0] === 'string'
    const cells = [name, ...Array.from(values, cell)]
    const width = Math.max(...cells.map((text) => text.length))
    return cells.map((text) => (isText ? text.padEnd(width) : text.padStart(width)))
  })
  const rows = blocks[0]?.map((_, row) =>
    blocks
      .map((block) => block[row])
      .join(GAP)
      .trimEnd(),
  )
  return `${(rows ?? []).join('\n')}\n`
}

function csvCell(value: number | string): string {
  if (typeof value === 'number') return Number.isNaN(value) ? '' : String(value)
  return /[",\n\r]/.test(value) ? `"${value.replaceAll('"', '""')}"` : value
}

/** Rows of comma-separated values, all digits kept, without the line of names. */
export function csvRows(columns: ShownColumn[]): string {
  const rows = Array.from(columns[0]?.values ?? [], (_, row) =>
    columns.map(({ values }) => csvCell(values[row])).join(','),
  )
  return rows.map((row) => `${row}\n`).join('')
}

export function csvNames(columns: Pick<ShownColumn, 'name'>[]): string {
  return `${columns.map(({ name }) => csvCell(name)).join(',')}\n`
}

/** Names and values, one pair a line, the values in one column. */
export function pairLines(pairs: [name: string, value: string][]): string {
  const width = Math.max(0, ...pairs.map(([name]) => name.length))
  return pairs.map(([name, value]) => `  ${name.padEnd(width)}${GAP}${value}\n`).join('')
}
