/** Depolarisation factors of a spheroid; along + 2 across = 1. */
export interface DepolarisationFactors {
  /** For a field along the axis of symmetry. */
  along: number
  /** For a field across it. */
  across: number
}

/**
 * Geometric depolarisation factors of a spheroid.
 *
 *   L_along = (1 - s) h(s),  s = 1 - 1/q^2,  L_across = (1 - L_along)/2
 *   h(s) = [artanh(sqrt s)/sqrt s - 1]/s = sum s^j/(2j + 3)  (artan for s < 0: oblate)
 *
 * @param axisRatio q, length along the axis of symmetry over width across it: above 1 prolate (needle), below 1 oblate
 * (plate)
 * @returns both factors, 1
 *
 * Source: Gans 1912, Ann. Phys. 37, 881, and textbooks; both from memory. Range: any q above 0; a needle has 0 and 1/2,
 * a plate 1 and 0, a sphere 1/3.
 */
export function depolarisationFactors(axisRatio: number): DepolarisationFactors {
  const squeeze = 1 / (axisRatio * axisRatio)
  const along = squeeze * stretchSum((1 - 1 / axisRatio) * (1 + 1 / axisRatio))
  return { along, across: (1 - along) / 2 }
}

/** h of the docstring; near the sphere its closed forms cancel. */
function stretchSum(stretch: number): number {
  if (Math.abs(stretch) < 0.02) {
    let sum = 0
    for (let j = 10; j >= 0; j--) sum = sum * stretch + 1 / (2 * j + 3)
    return sum
  }
  const root = Math.sqrt(Math.abs(stretch))
  return ((stretch > 0 ? Math.atanh(root) : Math.atan(root)) / root - 1) / stretch
}
