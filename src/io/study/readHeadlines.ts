import { join } from 'node:path'
import { InputError } from '../../model/errors.ts'
import {
  BRIGHTNESS_HEADLINES,
  type HeadlineSeries,
  type Headlines,
} from '../../model/experiments/headlines.ts'
import { readTable } from '../arrow/tableReader.ts'

const ICE = 'column_ice_ug_per_m2'

/** The headlines of a run, from the tables in its directory. */
export async function readHeadlines(directory: string): Promise<Headlines> {
  const budget = await readTable(join(directory, 'budget.arrow'))
  const time_h = numbers(budget.columns, 'time_h', directory)
  const ice = { quantity: ICE, channel: null, values: numbers(budget.columns, ICE, directory) }
  const brightness = await readTable(join(directory, 'brightness.arrow'))
  const names = [...((brightness.columns.channel ?? []) as string[])]
  const channels = [...new Set(names)]
  const series = channels.flatMap((channel) =>
    BRIGHTNESS_HEADLINES.map((quantity): HeadlineSeries => {
      const all = numbers(brightness.columns, quantity, directory)
      return { quantity, channel, values: all.filter((_, row) => names[row] === channel) }
    }),
  )
  return { time_h, series: [ice, ...series.filter(applies)] }
}

function numbers(
  columns: Record<string, Float64Array | string[]>,
  name: string,
  directory: string,
): number[] {
  const values = columns[name]
  if (!(values instanceof Float64Array))
    throw new InputError(`${directory} has no ${name}; it was written by another version`)
  return Array.from(values)
}

/** Backscatter is null throughout for what is no lidar. */
function applies({ quantity, values }: HeadlineSeries): boolean {
  return !quantity.startsWith('peak_backscatter') || !values.every(Number.isNaN)
}
