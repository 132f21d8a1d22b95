/**
 * The two axes of the column: altitude cells and radius classes.
 */

import { WATER_MOLECULE_MASS } from './constants.ts'
import type { GridSpec, SizeSpec } from './scenario/types.ts'

/** Uniform cells in resting altitude. */
export interface AltitudeGrid {
  levels: number
  spacing_m: number
  /** Cell centres, `levels` of them. */
  centres_m: Float64Array
  /** Cell faces, levels + 1. */
  faces_m: Float64Array
  /**
   * Every half cell from half a cell below the bottom to half a cell above the top, 2 levels + 3 points:
   * even indices are centres (0 and 2 levels + 2 outside the column), odd indices faces.
   */
  halfPoints_m: Float64Array
}

/** Index in `halfPoints_m` of the centre of a cell. */
export const centrePoint = (level: number): number => 2 * level + 2

/** Index in `halfPoints_m` of the face below a cell; face `levels` is the top. */
export const facePoint = (face: number): number => 2 * face + 1

export function makeAltitudeGrid({ bottom_m, top_m, levels }: GridSpec): AltitudeGrid {
  const spacing_m = (top_m - bottom_m) / levels
  const at = (halves: number) => bottom_m + (halves * spacing_m) / 2
  return {
    levels,
    spacing_m,
    centres_m: Float64Array.from({ length: levels }, (_, i) => at(2 * i + 1)),
    faces_m: Float64Array.from({ length: levels + 1 }, (_, i) => at(2 * i)),
    halfPoints_m: Float64Array.from({ length: 2 * levels + 3 }, (_, i) => at(i - 1)),
  }
}

/**
 * Radius classes, evenly spaced in xi, r(xi) = r_min + (r_max - r_min)(e^(b xi) - 1)/(e^b - 1).
 * A particle of a class has the radius at its middle; particles move between classes through the edges.
 */
export interface RadiusClasses {
  count: number
  /** Radius of the particles of each class, m. */
  radii_m: Float64Array
  /** Edges, count + 1; edge k is the lower edge of class k. */
  edges_m: Float64Array
  /** Radius change from the class below an edge to the class above, m; at the ends dr/dxi times the class width. */
  edgeSpacing_m: Float64Array
  /** Water molecules in one particle of each class. */
  molecules: Float64Array
  /** Continuous class coordinate of a radius: k at the radius of class k. */
  position(radius_m: number): number
}

/** @param density of ice, kg/m3 */
export function makeRadiusClasses(spec: SizeSpec, density: number): RadiusClasses {
  const { smallest_m, largest_m, classes: count, stretching: b } = spec
  const span = (largest_m - smallest_m) / Math.expm1(b)
  const radiusAt = (xi: number) => smallest_m + span * Math.expm1(b * xi)
  const radii_m = Float64Array.from({ length: count }, (_, k) => radiusAt((k + 0.5) / count))
  const edges_m = Float64Array.from({ length: count + 1 }, (_, k) => radiusAt(k / count))
  const edgeSpacing_m = Float64Array.from({ length: count + 1 }, (_, k) =>
    k === 0 || k === count
      ? (span * b * Math.exp((b * k) / count)) / count
      : radii_m[k] - radii_m[k - 1],
  )
  return {
    count,
    radii_m,
    edges_m,
    edgeSpacing_m,
    molecules: radii_m.map((radius) => moleculesInSphere(radius, density)),
    position: (radius_m) => (count * Math.log1p((radius_m - smallest_m) / span)) / b - 0.5,
  }
}

/** Water molecules in an ice sphere: (4/3) pi r^3 rho / m. */
export function moleculesInSphere(radius_m: number, density: number): number {
  return ((4 / 3) * Math.PI * radius_m ** 3 * density) / WATER_MOLECULE_MASS
}
