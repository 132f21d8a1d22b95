import { InputError } from '../errors.ts'
import { gridDesign } from './designs/gridDesign.ts'
import { latinHypercube } from './designs/latinHypercube.ts'
import { type SaltelliDesign, saltelliDesign } from './designs/saltelliDesign.ts'
import { MOST_SOBOL_DIMENSIONS } from './designs/sobolSequence.ts'
import type { KeyValue } from './setKey.ts'
import type { StudyAxis } from './studyAxis.ts'
import type { Study } from './studySchema.ts'

/** How the members of a study are spread. */
export type StudyDesign =
  | { kind: 'grid'; lengths: number[] }
  | { kind: 'latin_hypercube' }
  | { kind: 'sobol'; blocks: SaltelliDesign }

/** The members of a study, without their documents. */
export interface ChosenMembers {
  design: StudyDesign
  /** Number of members; their indices go from 0 to memberCount - 1. */
  memberCount: number
  /** Values of the axes in a member. */
  values(index: number): KeyValue[]
}

/** Spreads the members over the axes. Throws an InputError for an empty design and for one that is too large. */
export function chooseMembers(
  study: Study,
  axes: readonly StudyAxis[],
  maxMembers: number,
): ChosenMembers {
  if (axes.length === 0) throw new InputError('the design is empty: axes is; expected one or more')
  return study.design === 'grid'
    ? chooseGrid(study, axes, maxMembers)
    : chooseRandom(study, axes, maxMembers)
}

function chooseGrid(
  { samples }: Study,
  axes: readonly StudyAxis[],
  maxMembers: number,
): ChosenMembers {
  if (samples !== undefined) {
    throw new InputError(
      'samples has no meaning for a grid; allowed: for latin_hypercube and sobol',
    )
  }
  const values = axes.map((axis) => {
    if (axis.values !== null) return axis.values
    throw new InputError(`${axis.key} has a distribution; a grid needs list, linear or log`)
  })
  const lengths = values.map(({ length }) => length)
  const grid = gridDesign(lengths)
  refuseLarge(grid.count, lengths.join(' x '), maxMembers)
  return {
    design: { kind: 'grid', lengths },
    memberCount: grid.count,
    values: (index) => grid.positions(index).map((position, axis) => values[axis][position]),
  }
}

function chooseRandom(study: Study, axes: readonly StudyAxis[], maxMembers: number): ChosenMembers {
  const { samples, seed, design: kind } = study
  if (samples === undefined) {
    throw new InputError(`the design is empty: samples is missing; ${kind} needs it`)
  }
  const dims = axes.length
  if (kind === 'sobol' && 2 * dims > MOST_SOBOL_DIMENSIONS) {
    throw new InputError(`${dims} axes; allowed for sobol: up to ${MOST_SOBOL_DIMENSIONS / 2}`)
  }
  const perSample = kind === 'sobol' ? dims + 2 : 1
  const text = kind === 'sobol' ? `${samples} samples x (${dims} axes + 2)` : `${samples} samples`
  refuseLarge(samples * perSample, text, maxMembers)
  const blocks = kind === 'sobol' ? saltelliDesign(seed, samples, dims) : null
  const points = blocks ?? latinHypercube(seed, samples, dims)
  return {
    design: blocks === null ? { kind: 'latin_hypercube' } : { kind: 'sobol', blocks },
    memberCount: points.count,
    values: (index) => points.point(index).map((share, axis) => axes[axis].quantile(share)),
  }
}

function refuseLarge(count: number, text: string, maxMembers: number): void {
  if (count <= maxMembers) return
  throw new InputError(`${count} members (${text}); allowed: up to ${maxMembers}`)
}
