/**
 * What is wrong with a scenario, told by the path of the key, so that whoever holds the file can add line and column.
 */
import { InputError } from '../errors.ts'

export type Path = readonly (string | number)[]

export interface ScenarioProblem {
  path: Path
  /** Whether the key itself is wrong, or its value. */
  at: 'key' | 'value'
  /** What follows 'path: '. */
  message: string
}

/** The path as users write it in `--set`. */
export function dotted(path: Path): string {
  return path.length === 0 ? 'the scenario' : path.join('.')
}

export function problem(path: Path, message: string): ScenarioProblem {
  return { path, at: 'value', message }
}

const SHOWN_PROBLEMS = 6

/** The first problem and some more, one a line. */
export function problemText(lines: readonly string[]): string {
  const rest = lines.length - SHOWN_PROBLEMS
  const shown = lines.slice(0, SHOWN_PROBLEMS)
  return rest > 0 ? [...shown, `... and ${rest} more`].join('\n') : shown.join('\n')
}

export class ScenarioError extends InputError {
  readonly problems: readonly ScenarioProblem[]

  constructor(problems: readonly ScenarioProblem[]) {
    super(problemText(problems.map(({ path, message }) => `${dotted(path)}: ${message}`)))
    this.problems = problems
  }
}
