import type { TableField } from '../arrow/tableField.ts'

/** Units as names end in them and as tables state them, the longer endings first. */
const ENDINGS: [ending: string, unit: string][] = [
  ['_ng_per_m3', 'ng m-3'],
  ['_ug_per_m2', 'ug m-2'],
  ['_m2_per_s', 'm2 s-1'],
  ['_per_m_sr', 'm-1 sr-1'],
  ['_cm_per_s', 'cm s-1'],
  ['_per_cm3', 'cm-3'],
  ['_per_m3', 'm-3'],
  ['_per_sr', 'sr-1'],
  ['_per_s', 's-1'],
  ['_ppmv', '1e-6'],
  ['_deg', 'degree'],
  ['_min', 'min'],
  ['_km', 'km'],
  ['_nm', 'nm'],
  ['_Pa', 'Pa'],
  ['_h', 'h'],
  ['_d', 'd'],
  ['_s', 's'],
  ['_K', 'K'],
  ['_J', 'J'],
]

/** The unit that a name carries as its ending; '1' for a pure number. */
export function unitOfName(name: string): string {
  return ENDINGS.find(([ending]) => name.endsWith(ending))?.[1] ?? '1'
}

/** A column of numbers, with its unit from its name. */
export function numberField(name: string, longName: string): TableField {
  return {
    name,
    longName,
    unit: unitOfName(name),
    standardName: null,
    type: 'number',
    listLength: null,
  }
}

/** A column of texts. */
export function textField(name: string, longName: string, nullable = false): TableField {
  const field: TableField = {
    name,
    longName,
    unit: '',
    standardName: null,
    type: 'text',
    listLength: null,
  }
  return nullable ? { ...field, nullableText: true } : field
}
