import { InputError } from '../errors.ts'

/** Scenes that are not scored as they should be: how many, and the first few by name. */
export interface NamedScenes {
  count: number
  first: string[]
}

export interface SceneMatch {
  /** Rows that belong together, in the order of the truth and then of the estimates. */
  pairs: { truthRow: number; estimateRow: number }[]
  /** Scenes of which there is truth and at least one row of estimates. */
  matched: number
  /** Estimated, but not among the truth. */
  unknown: NamedScenes
  /** True, but without a row of estimates. */
  missing: NamedScenes
  /** Estimated more than once; the first row alone is scored. */
  duplicate: NamedScenes
}

const SHOWN = 5

/**
 * Finds the truth of every estimate by the name of its scene.
 *
 * @param draws where one scene is observed several times, the number of the draw in each row of estimates; else null
 * @throws InputError where the truth names a scene twice: there is no telling which one holds
 */
export function matchScenes(
  truth: readonly string[],
  estimates: readonly string[],
  draws: readonly string[] | null = null,
): SceneMatch {
  const truthRows = uniqueRows(truth)
  const rowsOfScene: number[][] = truth.map(() => [])
  const unknown = new Set<string>()
  const duplicate = new Set<string>()
  const seen = new Set<string>()
  estimates.forEach((scene, row) => {
    const key = JSON.stringify([scene, draws?.[row]])
    const truthRow = truthRows.get(scene)
    if (seen.has(key)) duplicate.add(scene)
    else if (truthRow !== undefined) rowsOfScene[truthRow].push(row)
    if (truthRow === undefined) unknown.add(scene)
    seen.add(key)
  })
  const missing = truth.filter((_, row) => rowsOfScene[row].length === 0)
  return {
    pairs: rowsOfScene.flatMap((rows, truthRow) =>
      rows.map((estimateRow) => ({ truthRow, estimateRow })),
    ),
    matched: truth.length - missing.length,
    unknown: named([...unknown]),
    missing: named(missing),
    duplicate: named([...duplicate]),
  }
}

function uniqueRows(truth: readonly string[]): Map<string, number> {
  const rows = new Map<string, number>()
  const twice = new Set<string>()
  truth.forEach((scene, row) => {
    if (rows.has(scene)) twice.add(scene)
    rows.set(scene, row)
  })
  if (twice.size > 0)
    throw new InputError(
      `the truth names ${twice.size === 1 ? 'a scene' : `${twice.size} scenes`} more than once: ${namesText(named([...twice]))}`,
    )
  return rows
}

function named(scenes: string[]): NamedScenes {
  return { count: scenes.length, first: scenes.slice(0, SHOWN) }
}

/** The first few names, and whether there are more. */
export function namesText({ count, first }: NamedScenes): string {
  return first.join(', ') + (count > first.length ? ' and more' : '')
}
