/** A set of points, made one at a time so that large designs take no memory. */
export interface Design {
  /** Number of points. */
  count: number
  dims: number
  /** Coordinates of a point, each in [0, 1). */
  point(index: number): number[]
}
