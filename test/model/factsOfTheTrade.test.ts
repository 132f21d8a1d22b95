import { beforeAll, describe, expect, it } from 'vitest'
import { type Course, lastSixHours, mean } from '../support/brightnessCourse.ts'
import { columnOf } from '../support/column.ts'
import { ONE_HOUR_WAVE } from '../support/numericsVariants.ts'

/** Hours 12 to 18 of the default night on a small grid. The facts: common practice, no source. */
const SMALL = { grid: { levels: 60 }, sizes: { classes: 24 }, duration_h: 18 }

const night = (change: object): Course => lastSixHours(columnOf({ ...SMALL, ...change }))

let usual: number
beforeAll(() => {
  usual = mean(night({}).brightness)
})

/** Mean brightness over that of the default night. */
const brightness = (change: object) => mean(night(change).brightness) / usual

// Limits far from any numerical error of this grid, which is some per cent.
describe('a cloud', () => {
  it('is removed by a few kelvin of warming', () => {
    expect(brightness({ temperature: { offset_K: 6 } })).toBeLessThan(0.01)
  })

  it('is brighter in colder air', () => {
    expect(brightness({ temperature: { offset_K: -2 } })).toBeGreaterThan(1.2)
  })

  it('is brighter in wetter air', () => {
    expect(brightness({ water: { factor: 1.3 } })).toBeGreaterThan(1.2)
  })

  it('is weakened by waves of an hour', () => {
    expect(brightness(ONE_HOUR_WAVE)).toBeLessThan(0.8)
  })
})
