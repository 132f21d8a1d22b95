import type { RadiusClasses } from '../../grid.ts'

/**
 * The Kelvin factor exp(a/r) at all class edges, for any Kelvin radius a, without an exponential per cell:
 * rows of exact factors at evenly spaced a, filled when first needed, and a short series for the remainder
 *   exp(a/r) = exp(a_0/r) (1 + d + d^2/2 + d^3/6),  d = (a - a_0)/r.
 * With |d| below 2e-3 at the smallest edge the term left out is below 1e-12 of the factor.
 */
export interface KelvinTable {
  /** Fills the row if need be and returns where it starts in `factors`. */
  rowOf(kelvinRadius_m: number): number
  factors: Float64Array
  /** The Kelvin radius for which a row is exact, m. */
  exactRadius(row: number): number
  /** 1/r of the edges, 1/m. */
  inverseEdges: Float64Array
  /** Inverse spacing of the classes on both sides of the edges, 1/m. */
  inverseEdgeSpacing: Float64Array
}

/** Largest Kelvin radius held, m: ice at 40 K. */
const LARGEST = 20e-9

export function makeKelvinTable({ edges_m, edgeSpacing_m }: RadiusClasses): KelvinTable {
  const spacing = 4e-3 * edges_m[0]
  const rows = Math.ceil(LARGEST / spacing) + 1
  const width = edges_m.length
  const factors = new Float64Array(rows * width)
  const filled = new Uint8Array(rows)
  return {
    factors,
    inverseEdges: edges_m.map((radius) => 1 / radius),
    inverseEdgeSpacing: edgeSpacing_m.map((spacing) => 1 / spacing),
    exactRadius: (row) => (row / width) * spacing,
    rowOf(kelvinRadius_m) {
      const index = Math.min(Math.round(kelvinRadius_m / spacing), rows - 1)
      const start = index * width
      if (filled[index] === 0) {
        for (let k = 0; k < width; k++)
          factors[start + k] = Math.exp((index * spacing) / edges_m[k])
        filled[index] = 1
      }
      return start
    },
  }
}
