/** The scale in which the slope along an axis is taken. */
export interface SlopeScale {
  /** Such as 'd ln y/d ln x'. */
  unit: string
  of(value: number): number
}

/** Temperatures count per kelvin, positive quantities in the logarithm, all else per unit of the key. */
export function slopeScale(key: string, values: readonly number[]): SlopeScale {
  if (key.endsWith('_K')) return { unit: 'd ln y per K', of: (value) => value }
  if (values.every((value) => value > 0)) return { unit: 'd ln y/d ln x', of: Math.log }
  return { unit: 'd ln y per unit of x', of: (value) => value }
}
