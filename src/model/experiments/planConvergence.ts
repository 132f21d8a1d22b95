import { InputError } from '../errors.ts'
import type { ScenarioDocument } from '../scenario/schema.ts'
import { validate } from '../scenario/validate.ts'
import { tightened } from './tightened.ts'

export type Refinement = 'level spacing' | 'class width' | 'tolerance'

/** By how much each step divides the spacing, the width or the tolerances. */
export const REFINEMENT_FACTORS: Record<Refinement, number> = {
  'level spacing': 2,
  'class width': 2,
  tolerance: 10,
}

export interface ConvergenceMember {
  /** null: the scenario as it stands. */
  refinement: Refinement | null
  /** 0 as it stands, 1 refined once, 2 twice. */
  step: 0 | 1 | 2
  /** Such as '256 levels'. */
  words: string
  document: ScenarioDocument
}

export interface ConvergencePlan {
  members: ConvergenceMember[]
}

type Refine = (
  document: ScenarioDocument,
  factor: number,
) => { words: string; document: ScenarioDocument }

const refinements: Record<Refinement, Refine> = {
  'level spacing': (document, factor) => {
    const levels = document.grid.levels * factor
    return {
      words: `${levels} levels`,
      document: { ...document, grid: { ...document.grid, levels } },
    }
  },
  'class width': (document, factor) => {
    const classes = document.sizes.classes * factor
    // The ceiling is one class in so long a time: the same speed in nm/s takes a time in proportion to the width.
    const sublimation_ceiling_s = document.numerics.sublimation_ceiling_s / factor
    return {
      words: `${classes} classes`,
      document: {
        ...document,
        sizes: { ...document.sizes, classes },
        numerics: { ...document.numerics, sublimation_ceiling_s },
      },
    }
  },
  tolerance: (document, factor) => ({
    words: `tolerances / ${factor}`,
    document: tightened(document, factor),
  }),
}

/**
 * The runs of a convergence test: the scenario as it stands, and level spacing, class width and tolerances refined in
 * turn, once and twice. Throws an InputError when a scenario is too fine to be refined twice.
 */
export function planConvergence(document: ScenarioDocument): ConvergencePlan {
  const refined = (Object.keys(refinements) as Refinement[]).flatMap((refinement) =>
    ([1, 2] as const).map((step): ConvergenceMember => {
      const factor = REFINEMENT_FACTORS[refinement] ** step
      const { words, document: finer } = refinements[refinement](document, factor)
      return { refinement, step, words, document: checked(finer, refinement) }
    }),
  )
  return { members: [{ refinement: null, step: 0, words: 'as it stands', document }, ...refined] }
}

function checked(document: ScenarioDocument, refinement: Refinement): ScenarioDocument {
  try {
    return validate(document)
  } catch (error) {
    if (!(error instanceof InputError)) throw error
    throw new InputError(`the ${refinement} cannot be refined twice: ${error.message}`)
  }
}
