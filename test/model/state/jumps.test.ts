import { describe, expect, it } from 'vitest'
import { centrePoint } from '../../../src/model/grid.ts'
import type { Perturbation } from '../../../src/model/scenario/types.ts'
import { initialSnapshot } from '../../../src/model/simulate.ts'
import { columnTotals } from '../../../src/model/state/columnTotals.ts'
import { inject, rebase } from '../../../src/model/state/jumps.ts'
import { columnOf, uniform } from '../../support/column.ts'

/** A column with ice whose temperature rises by 10 K in four days. */
const warming = columnOf({
  duration_h: 96,
  grid: { levels: 20 },
  sizes: { classes: 12 },
  temperature: {
    series: [0, 96].map((time_h) => ({
      time_h,
      ...uniform('temperature_K', 140 + (10 * time_h) / 96),
    })),
  },
  initial: {
    ice: [
      {
        altitude_km: 84,
        width_km: 2,
        number_per_cm3: 50,
        median_radius_nm: 30,
        geometric_width: 1.3,
      },
    ],
  },
})
const { layout, grid, atmosphere, scenario } = warming
const classes = scenario.background.nucleusClasses
const basis = atmosphere.basis(0)

const band: Perturbation = {
  quantity: 'water',
  mode: 'add',
  amount: 1e-6,
  altitude: { shape: 'topHat', from_m: 82e3, to_m: 86e3 },
  time: { shape: 'step', start_s: 3600 },
}

describe('inject', () => {
  it('adds a mixing ratio of water in its band and books what it added', () => {
    const { y } = initialSnapshot(warming)
    const start = y.slice()
    inject(y, band, classes, { ...warming, rest: basis.rest })
    grid.centres_m.forEach((z, i) => {
      const added = (y[i] - start[i]) / basis.rest.density_per_m3[centrePoint(i)]
      expect(added).toBeCloseTo(z >= 82e3 && z <= 86e3 ? 1e-6 : 0, 18)
    })
    const gain = columnTotals(y, warming).vapour - columnTotals(start, warming).vapour
    expect(y[layout.waterAccount.injection] / gain).toBeCloseTo(1, 12)
  })

  it('adds nuclei by the shares of their classes and multiplies all classes alike', () => {
    const { y } = initialSnapshot(warming)
    const nuclei: Perturbation = { ...band, quantity: 'nuclei', amount: 1e9 }
    const level = grid.centres_m.findIndex((z) => z > 84e3)
    const at = (j: number) => layout.nuclei + level * classes.length + j
    const before = classes.map((_, j) => y[at(j)])
    inject(y, nuclei, classes, { ...warming, rest: basis.rest })
    classes.forEach(({ share }, j) => {
      expect((y[at(j)] - before[j]) / (share * 1e9)).toBeCloseTo(1, 12)
    })
    const added = classes.map((_, j) => y[at(j)])
    inject(y, { ...nuclei, mode: 'multiply', amount: 3 }, classes, { ...warming, rest: basis.rest })
    classes.forEach((_, j) => {
      expect(y[at(j)] / added[j]).toBeCloseTo(3, 12)
    })
  })

  it('leaves ice and cores alone', () => {
    const { y } = initialSnapshot(warming)
    const start = y.slice()
    inject(y, { ...band, quantity: 'nuclei', amount: 1e9 }, classes, {
      ...warming,
      rest: basis.rest,
    })
    const ice = (state: Float64Array) => state.slice(layout.ice, layout.waterAccount.top)
    expect(ice(y)).toEqual(ice(start))
  })
})

describe('rebase', () => {
  it('holds all mixing ratios and books the change of water and of every nucleus class', () => {
    const { y } = initialSnapshot(warming)
    const start = y.slice()
    const next = atmosphere.basis(86_400)
    rebase(y, basis, next, warming)
    const density = (rest: typeof basis.rest, level: number) =>
      rest.density_per_m3[centrePoint(level)]
    for (let index = 0; index < layout.waterAccount.top; index++) {
      if (start[index] === 0) continue
      const level = levelOf(index)
      const mixingRatio = start[index] / density(basis.rest, level)
      expect(y[index] / density(next.rest, level) / mixingRatio).toBeCloseTo(1, 12)
    }
    const [before, after] = [columnTotals(start, warming), columnTotals(y, warming)]
    const water = after.vapour + after.ice - before.vapour - before.ice
    // 1e-12 of the column, by which the change of 2.5 K moves it by several per cent.
    expect(Math.abs(y[layout.waterAccount.rebasing] - water)).toBeLessThan(1e-12 * before.vapour)
    expect(Math.abs(water)).toBeGreaterThan(1e-3 * before.vapour)
    classes.forEach((_, j) => {
      const change = after.nuclei[j] - before.nuclei[j]
      const booked = y[layout.nucleusAccount.rebasing + j]
      expect(Math.abs(booked - change)).toBeLessThan(1e-12 * before.nuclei[j])
    })
  })
})

function levelOf(index: number): number {
  if (index < layout.nuclei) return index
  if (index < layout.ice) return Math.floor((index - layout.nuclei) / layout.nucleusClasses)
  if (index < layout.cores) return Math.floor((index - layout.ice) / layout.classes)
  return Math.floor((index - layout.cores) / layout.nucleusClasses)
}
