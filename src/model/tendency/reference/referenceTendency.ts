/**
 * The right-hand side of the column, written to be read: a sum of named terms that call the process functions cell
 * by cell. The fast form in `kernel` is tested against it and nothing else runs on it.
 *
 *   dy/dt =  verticalMotion   -d/dz of what wind and fall carry
 *          + lateral          +q d(n0 w)/dz, air that leaves or enters sideways
 *          + diffusion        -d/dz of what eddies and molecules mix
 *          + coreTransport    -d/dz of the cores inside the moving ice
 *          + growth           ice along the radius, vapour the other way
 *          + nucleation       nuclei and vapour to ice
 *          + photolysis       -vapour over its lifetime
 *          + injection        +what ramped perturbations bring
 */
import type { AirBasis, Interval } from '../../atmosphere/atmosphere.ts'
import type { Column } from '../../state/column.ts'
import type { Tendency } from '../tendency.ts'
import { coreTransport } from './coreTransport.ts'
import { diffusion } from './diffusion.ts'
import { growth } from './growth.ts'
import { injection } from './injection.ts'
import { lateral } from './lateral.ts'
import { nucleation } from './nucleation.ts'
import { photolysis } from './photolysis.ts'
import type { Term } from './situation.ts'
import { verticalMotion } from './verticalMotion.ts'

const TERMS = {
  verticalMotion,
  lateral,
  diffusion,
  coreTransport,
  growth,
  nucleation,
  photolysis,
  injection,
} satisfies Record<string, Term>

export type TermName = keyof typeof TERMS

export const TERM_NAMES = Object.keys(TERMS) as TermName[]

/** @param terms which terms to add up; all by default */
export function makeReferenceTendency(
  column: Column,
  terms: readonly TermName[] = TERM_NAMES,
): Tendency {
  let basis: AirBasis
  let interval: Interval
  return {
    enter(nextBasis, nextInterval) {
      basis = nextBasis
      interval = nextInterval
    },
    evaluate(time_s, y, dy) {
      const air = column.atmosphere.read(basis, time_s, interval)
      const now = { column, rest: basis.rest, air, y: Float64Array.from(y) }
      const sum = new Float64Array(column.layout.length)
      for (const name of terms) TERMS[name](now, sum)
      for (let index = 0; index < sum.length; index++) dy[index] = sum[index]
    },
  }
}
