/** The order p with which an error falls when the spacing is divided by a factor: log(coarse/fine)/log(factor). */
export function observedOrder(coarse: number, fine: number, factor = 2): number {
  return Math.log(coarse / fine) / Math.log(factor)
}

/** Mean of |computed - exact| over the mean of |exact|. */
export function meanError(computed: ArrayLike<number>, exact: ArrayLike<number>): number {
  let difference = 0
  let size = 0
  for (let i = 0; i < exact.length; i++) {
    difference += Math.abs(computed[i] - exact[i])
    size += Math.abs(exact[i])
  }
  return difference / size
}
