/**
 * How an output variable is described. Arrow schema, documentation and plot labels come from these lists.
 * Names carry their unit as a suffix and match ^[a-z][A-Za-z0-9_]*$.
 */
export interface Variable {
  name: string
  longName: string
  /** UDUNITS-like unit of the values as stored; '1' for pure numbers, '' for text. */
  unit: string
  /** CF standard name where one exists. */
  standardName: string | null
  type: 'number' | 'text'
}
