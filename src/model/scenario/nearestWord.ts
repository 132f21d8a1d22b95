/** Edit distance: the fewest insertions, deletions and replacements of a letter that turn one word into another. */
function editDistance(from: string, to: string): number {
  let row = Array.from({ length: to.length + 1 }, (_, j) => j)
  for (let i = 1; i <= from.length; i++) {
    const next = [i]
    for (let j = 1; j <= to.length; j++) {
      const replaced = row[j - 1] + (from[i - 1] === to[j - 1] ? 0 : 1)
      next.push(Math.min(replaced, row[j] + 1, next[j - 1] + 1))
    }
    row = next
  }
  return row[to.length]
}

/** The word that a mistyped one most likely stands for; null when none is near. */
export function nearestWord(mistyped: string, words: readonly string[]): string | null {
  const lower = mistyped.slice(0, 80).toLowerCase()
  let best: { word: string; distance: number } | null = null
  for (const word of words) {
    const stem = word.toLowerCase()
    // A key without its unit (`duration` for `duration_h`) is the commonest slip.
    const distance = stem.startsWith(`${lower}_`) ? 1 : editDistance(lower, stem)
    if (best === null || distance < best.distance) best = { word, distance }
  }
  return best !== null && best.distance <= Math.max(2, lower.length / 3) ? best.word : null
}
