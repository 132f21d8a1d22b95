import { Field, FixedSizeList, Float64, Schema, Utf8 } from 'apache-arrow'
import type { Variable } from '../../model/diagnostics/variables.ts'

/** One column of a table: a variable, and for a list column how many values each row holds. */
export interface TableField extends Variable {
  listLength: number | null
  /** Whether a text may be null, where it does not apply; numbers always may. */
  nullableText?: boolean
}

/** Named texts that belong to a whole table, written in the order of their declaration. */
export type TableMetadata = [name: string, value: string][]

export function scalarFields(variables: Variable[]): TableField[] {
  return variables.map((variable) => ({ ...variable, listLength: null }))
}

export function listField(variable: Variable, listLength: number): TableField {
  return { ...variable, listLength }
}

function fieldType(field: TableField) {
  if (field.listLength !== null)
    return new FixedSizeList(field.listLength, new Field('item', new Float64(), false))
  return field.type === 'text' ? new Utf8() : new Float64()
}

function fieldMetadata(field: TableField): Map<string, string> {
  const metadata = new Map([
    ['unit', field.unit],
    ['long_name', field.longName],
  ])
  if (field.standardName !== null) metadata.set('standard_name', field.standardName)
  return metadata
}

/** Numbers may be null, where a quantity does not apply; texts only where so declared, lists never. */
export function arrowSchema(fields: TableField[], metadata: TableMetadata): Schema {
  return new Schema(
    fields.map((field) => {
      const isNumber = field.type === 'number' && field.listLength === null
      const nullable = isNumber || field.nullableText === true
      return new Field(field.name, fieldType(field), nullable, fieldMetadata(field))
    }),
    new Map(metadata),
  )
}

/** The way back: what a file's schema says about one of its columns. */
export function tableField(field: Field): TableField {
  const isList = field.type instanceof FixedSizeList
  return {
    name: field.name,
    longName: field.metadata.get('long_name') ?? field.name,
    unit: field.metadata.get('unit') ?? '',
    standardName: field.metadata.get('standard_name') ?? null,
    type: field.type instanceof Utf8 ? 'text' : 'number',
    listLength: isList ? (field.type as FixedSizeList).listSize : null,
  }
}
