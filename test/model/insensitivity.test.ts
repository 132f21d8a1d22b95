import { describe, expect, it } from 'vitest'
import { type Course, difference, lastSixHours } from '../support/brightnessCourse.ts'
import { columnOf } from '../support/column.ts'
import { ceilings, ONE_HOUR_WAVE, TIGHT } from '../support/numericsVariants.ts'

/** Hours 0 to 6 of a default night on a small grid: the ice is young, so nucleation and sublimation matter most. */
const SMALL = { grid: { levels: 60 }, sizes: { classes: 24 }, duration_h: 6 }

const course = (document: object): Course => lastSixHours(columnOf({ ...SMALL, ...document }))

describe.each([
  // The limits are what a user may expect not to see: 0.1 %, and 0.5 % of ceilings where waves exercise them.
  ['quiet', {}, 0.001],
  ['with a one-hour wave', ONE_HOUR_WAVE, 0.005],
] as const)('the brightness of a night %s', (_, night, ceilingLimit) => {
  const usual = course(night)

  it('does not show the rate ceilings: 15 s for 60 s', () => {
    expect(
      difference(usual, course({ ...night, ...ceilings(15) }), 'brightness').worst,
    ).toBeLessThan(ceilingLimit)
  })

  it('does not show the tolerances: a hundred times tighter', () => {
    expect(difference(usual, course({ ...night, ...TIGHT }), 'brightness').worst).toBeLessThan(
      0.001,
    )
  })

  it.each([7, 60])('does not show the output times: every %d min for every 10', (minutes) => {
    const other = course({ ...night, output_every_min: minutes })
    expect(difference(usual, other, 'brightness').worst).toBeLessThan(0.001)
  })
})

describe('the measure of difference', () => {
  it('shows ceilings that are too long under waves', () => {
    const usual = course(ONE_HOUR_WAVE)
    const slow = course({ ...ONE_HOUR_WAVE, ...ceilings(600) })
    expect(difference(slow, usual, 'brightness').worst).toBeGreaterThan(0.02)
  })
})
