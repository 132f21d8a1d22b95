import { InputError } from '../../model/errors.ts'
import { nearestWord } from '../../model/scenario/nearestWord.ts'
import { quantityNames, type SceneTable, UNCERTAINTY } from './sceneTable.ts'

export interface CommonQuantities {
  /** Names of the quantities that both tables have, in the order of the truth. */
  scored: string[]
  /** What the estimates have besides, each with the name that was perhaps meant. */
  unscored: { name: string; nearest: string | null }[]
}

/** Throws an InputError where there is nothing to score. */
export function commonQuantities(estimates: SceneTable, truth: SceneTable): CommonQuantities {
  const known = quantityNames(truth)
  const scored = known.filter((name) => estimates.columns.has(name))
  const uncertainties = [...estimates.columns.keys()].filter((name) => name.endsWith(UNCERTAINTY))
  const quantities = quantityNames(estimates)
  if (scored.length === 0) {
    const named = (names: string[]) => (names.length === 0 ? 'none' : names.join(', '))
    throw new InputError(
      `${estimates.name} and ${truth.name} have no quantity in common; estimated: ${named(quantities)}; true: ${named(known)}`,
    )
  }
  const wanted = scored.map((name) => `${name}${UNCERTAINTY}`)
  const unscored = [
    ...quantities.filter((name) => !known.includes(name)),
    ...uncertainties.filter((name) => !wanted.includes(name)),
  ]
  return {
    scored,
    unscored: unscored.map((name) => ({ name, nearest: nearestWord(name, [...known, ...wanted]) })),
  }
}
