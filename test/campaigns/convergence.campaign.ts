import { describe, expect, it } from 'vitest'
import { type Course, difference, lastSixHours, mean } from '../support/brightnessCourse.ts'
import { columnOf } from '../support/column.ts'
import { ceilings, ONE_HOUR_WAVE, TIGHT } from '../support/numericsVariants.ts'
import { percent, printTable } from './printTable.ts'

const DEFAULT_CLASSES = 48
const DEFAULT_CEILING_S = 60

/**
 * The last six hours of the default night on another grid. The ceiling of sublimation is one class per so many seconds,
 * so that the same ceiling in nm/s takes a time in proportion to the width of the classes.
 */
function onGrid(night: object, levels: number, classes: number): Course {
  const seconds = (DEFAULT_CEILING_S * DEFAULT_CLASSES) / classes
  return lastSixHours(
    columnOf({ ...night, grid: { levels }, sizes: { classes }, ...ceilings(seconds) }),
  )
}

function compared(grid: string, course: Course, finer: string, reference: Course) {
  const brightness = difference(course, reference, 'brightness')
  const columnIce = difference(course, reference, 'columnIce')
  const row = {
    grid,
    'compared with': finer,
    'brightness, 1/sr': mean(course.brightness),
    'error of its mean': percent(brightness.mean),
    'at its worst': percent(brightness.worst),
    'column ice, ug/m2': mean(course.columnIce),
    'error of that': percent(columnIce.mean),
    'at worst': percent(columnIce.worst),
  }
  return { brightness, columnIce, row }
}

describe('resolution, over the last 6 h of 24', () => {
  it('is enough in the quiet night', () => {
    const usual = onGrid({}, 128, 48)
    const finest = onGrid({}, 256, 96)
    const all = compared('128 x 48', usual, '256 x 96', finest)
    const alone = [
      compared('256 x 48', onGrid({}, 256, 48), '256 x 96', finest),
      compared('128 x 96', onGrid({}, 128, 96), '256 x 96', finest),
    ]
    printTable(
      'Quiet night: levels x classes against both twice as fine',
      [all, ...alone].map(({ row }) => row),
    )
    // 2 % of brightness and 1 % of column ice: less than any instrument's calibration.
    expect(all.brightness.worst).toBeLessThan(0.02)
    expect(all.columnIce.worst).toBeLessThan(0.01)
  })

  it('is enough under a one-hour wave with 96 classes; what 48 cost is printed', () => {
    const usual = onGrid(ONE_HOUR_WAVE, 128, 48)
    const better = onGrid(ONE_HOUR_WAVE, 128, 96)
    const best = onGrid(ONE_HOUR_WAVE, 128, 192)
    const byLevels = compared('128 x 96', better, '256 x 96', onGrid(ONE_HOUR_WAVE, 256, 96))
    const byClasses = compared('128 x 96', better, '128 x 192', best)
    const atDefaultCeilings = [96, 192].map((classes) => {
      const course = lastSixHours(columnOf({ ...ONE_HOUR_WAVE, sizes: { classes } }))
      return compared(`128 x ${classes}, ceilings of 60 s`, course, '128 x 192', best)
    })
    printTable(
      'One-hour wave: levels x classes against finer grids',
      [
        compared('128 x 48', usual, '128 x 192', best),
        byClasses,
        byLevels,
        ...atDefaultCeilings,
      ].map(({ row }) => row),
    )
    // As in the quiet night; a wave makes and destroys small ice, so it asks for twice the classes.
    expect(Math.abs(byClasses.brightness.mean)).toBeLessThan(0.02)
    expect(Math.abs(byLevels.brightness.mean)).toBeLessThan(0.02)
    expect(Math.abs(atDefaultCeilings[0].brightness.mean)).toBeLessThan(0.02)
  })
})

describe.each([
  ['quiet night', {}, 0.001],
  ['one-hour wave', ONE_HOUR_WAVE, 0.005],
] as const)('insensitivity, %s', (name, night, ceilingLimit) => {
  it('holds for ceilings, tolerances and output times', () => {
    const course = (document: object) => lastSixHours(columnOf({ ...night, ...document }))
    const usual = course({})
    const changes: [name: string, document: object, limit: number][] = [
      ['ceilings 60 -> 15 s', ceilings(15), ceilingLimit],
      ['tolerances / 100', TIGHT, 0.001],
      ['output 10 -> 2 min', { output_every_min: 2 }, 0.001],
      ['output 10 -> 7 min', { output_every_min: 7 }, 0.001],
      ['output 10 -> 60 min', { output_every_min: 60 }, 0.001],
    ]
    const results = changes.map(([change, document, limit]) => {
      const { mean: ofMean, worst } = difference(course(document), usual, 'brightness')
      return { change, limit, 'of the mean': ofMean, 'at worst': worst }
    })
    printTable(
      `Relative change of brightness over the last 6 h of 24, ${name}`,
      results.map((row) => ({
        ...row,
        limit: percent(row.limit),
        'of the mean': percent(row['of the mean']),
        'at worst': percent(row['at worst']),
      })),
    )
    for (const { change, limit, 'at worst': worst } of results)
      expect(worst, change).toBeLessThan(limit)
  })
})
