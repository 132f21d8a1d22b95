const MOST_SHOWN = 12

/** Increasing whole numbers as a short text: 0-4, 7, 9-11. */
export function numberRanges(numbers: readonly number[]): string {
  const ranges: [from: number, to: number][] = []
  for (const number of numbers) {
    const last = ranges.at(-1)
    if (last !== undefined && last[1] === number - 1) last[1] = number
    else ranges.push([number, number])
  }
  const texts = ranges.map(([from, to]) => (from === to ? `${from}` : `${from}-${to}`))
  if (texts.length <= MOST_SHOWN) return texts.join(', ')
  return `${texts.slice(0, MOST_SHOWN).join(', ')} and more`
}
