/** Every combination of positions on axes. */
export interface GridDesign {
  count: number
  /** Position on each axis; the last axis runs fastest. */
  positions(index: number): number[]
}

/** @param lengths number of values on each axis */
export function gridDesign(lengths: readonly number[]): GridDesign {
  return {
    count: lengths.reduce((product, length) => product * length, 1),
    positions(index) {
      let rest = index
      return lengths
        .toReversed()
        .map((length) => {
          const position = rest % length
          rest = Math.floor(rest / length)
          return position
        })
        .toReversed()
    },
  }
}
