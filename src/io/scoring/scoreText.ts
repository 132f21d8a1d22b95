import type { QuantityScore } from '../../model/scoring/scoreQuantity.ts'
import {
  type BinScore,
  type ScoredStatistic,
  STATISTICS,
  type StatisticName,
} from '../../model/scoring/types.ts'
import { pairLines, shortNumber, textTable } from '../textTable.ts'

const WORDS: Record<StatisticName, string> = {
  bias: 'bias',
  rmse: 'rmse',
  medianAbsoluteError: 'median_absolute_error',
  correlation: 'correlation',
  slope: 'slope',
  coverage: 'coverage',
  hitRate: 'hit_rate',
  falseAlarmRate: 'false_alarm_rate',
}

/** How well one quantity was estimated, for the screen. */
export function scoreText(name: string, { overall, bins }: QuantityScore): string {
  const shown = STATISTICS.filter((statistic) => overall[statistic] !== null)
  const pairs = shown.map((statistic): [string, string] => [
    WORDS[statistic],
    withInterval(overall[statistic] as ScoredStatistic),
  ])
  const head = `${name}: ${counted(overall.scenes, 'scene')}, ${counted(overall.estimates, 'estimate')}, ${overall.uncertainties} with uncertainty\n`
  return `${head}${pairLines(pairs)}${bins.length < 2 ? '' : binsText(bins, shown)}`
}

export function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? '' : 's'}`
}

function withInterval({ value, low, high }: ScoredStatistic): string {
  if (low === null || high === null) return shortNumber(value)
  return `${shortNumber(value)}  (${shortNumber(low)} to ${shortNumber(high)})`
}

function binsText(bins: readonly BinScore[], shown: readonly StatisticName[]): string {
  return textTable([
    { name: 'truth_from', values: bins.map(({ from }) => from ?? Number.NaN) },
    { name: 'to', values: bins.map(({ to }) => to ?? Number.NaN) },
    { name: 'estimates', values: bins.map(({ estimates }) => estimates) },
    ...shown.map((statistic) => ({
      name: WORDS[statistic],
      values: bins.map((bin) => bin[statistic]?.value ?? Number.NaN),
    })),
  ])
}
