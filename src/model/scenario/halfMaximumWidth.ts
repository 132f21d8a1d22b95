/** Full width at half maximum of a Gaussian over its standard deviation, 2 sqrt(2 ln 2). */
export const HALF_MAXIMUM_WIDTH = 2 * Math.sqrt(2 * Math.LN2)
