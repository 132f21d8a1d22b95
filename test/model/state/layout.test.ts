import { describe, expect, it } from 'vitest'
import {
  describeIndex,
  makeStateLayout,
  NUCLEUS_ACCOUNTS,
  WATER_ACCOUNTS,
} from '../../../src/model/state/layout.ts'

const layout = makeStateLayout(5, 4, 3)

describe('makeStateLayout', () => {
  it('gives every index of the state to exactly one quantity', () => {
    const places = [
      ...range(layout.vapour, 5),
      ...range(layout.nuclei, 5 * 3),
      ...range(layout.ice, 5 * 4),
      ...range(layout.cores, 5 * 3),
      ...WATER_ACCOUNTS.map((name) => layout.waterAccount[name]),
      ...NUCLEUS_ACCOUNTS.flatMap((name) => range(layout.nucleusAccount[name], 3)),
    ]
    expect(places.sort((a, b) => a - b)).toEqual(range(0, layout.length))
  })
})

describe('describeIndex', () => {
  it('names quantity, class and level', () => {
    expect(describeIndex(layout, layout.vapour + 4)).toEqual({ quantity: 'water vapour', level: 4 })
    expect(describeIndex(layout, layout.nuclei + 2 * 3 + 1)).toEqual({
      quantity: 'free nuclei of class 2',
      level: 2,
    })
    expect(describeIndex(layout, layout.ice + 3 * 4)).toEqual({
      quantity: 'ice of class 1',
      level: 3,
    })
    expect(describeIndex(layout, layout.cores + 4 * 3 + 2)).toEqual({
      quantity: 'cores of class 3',
      level: 4,
    })
  })

  it('has no level for an account', () => {
    expect(describeIndex(layout, layout.waterAccount.lateral)).toEqual({
      quantity: 'budget account',
      level: null,
    })
    expect(describeIndex(layout, layout.length - 1).level).toBeNull()
  })
})

function range(start: number, count: number): number[] {
  return Array.from({ length: count }, (_, i) => start + i)
}
