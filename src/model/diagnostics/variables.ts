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

/** A variable together with how it is worked out. */
export interface Computed<Source, Result> extends Variable {
  compute(source: Source): Result
}

/** A numerical variable; most have no CF standard name. */
export function variable(
  name: string,
  longName: string,
  unit: string,
  standardName: string | null = null,
): Variable {
  return { name, longName, unit, standardName, type: 'number' }
}

/** The description alone, as it goes to a file. */
export function describe({ name, longName, unit, standardName, type }: Variable): Variable {
  return { name, longName, unit, standardName, type }
}
