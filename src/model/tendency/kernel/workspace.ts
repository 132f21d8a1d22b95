import type { Column } from '../../state/column.ts'
import { NO_ICE } from '../noIce.ts'

/** Scratch of the fast right-hand side, made once. Rows of levels hold their classes side by side. */
export interface IceWorkspace {
  levels: number
  classes: number
  nucleusClasses: number
  /** Number of classes up to the largest that holds ice, per level. */
  occupied: Int32Array
  /** Mixing ratio of each class, zero beyond the occupied ones. */
  q: Float64Array
  /** What the ice of each class gains, 1/(m3 s); handed over to dy when complete. */
  gain: Float64Array
  /** Number of classes whose gain has been set, per level; that of the others is zero. */
  touched: Int32Array
  /** Half the limited change across the cells below the face being crossed, per class. */
  halfSlope: Float64Array
  /** Upward flux through the face below the level being closed, per class, 1/(m2 s). */
  fluxBelow: Float64Array
  /** Share of each nucleus class in the cores of a level. */
  mix: Float64Array
  /** Ice particles carried upward through each face by wind and fall, 1/(m2 s). */
  carried: Float64Array
  radii: Float64Array
  molecules: Float64Array
  /** Water in one particle more than in one of the class below, molecules. */
  moleculeSteps: Float64Array
  inverseEdgeSpacing: Float64Array
  inverseEdges: Float64Array
  /** Shares of the nucleus classes in the background: the mix where there is no ice. */
  backgroundMix: Float64Array
}

export function makeIceWorkspace({ grid, sizes, layout, scenario }: Column): IceWorkspace {
  const { levels } = grid
  const { nucleusClasses, classes } = layout
  return {
    levels,
    classes,
    nucleusClasses,
    occupied: new Int32Array(levels),
    q: new Float64Array(levels * classes),
    gain: new Float64Array(levels * classes),
    touched: new Int32Array(levels),
    halfSlope: new Float64Array(classes),
    fluxBelow: new Float64Array(classes),
    mix: new Float64Array(levels * nucleusClasses),
    carried: new Float64Array(levels + 1),
    radii: sizes.radii_m,
    molecules: sizes.molecules,
    moleculeSteps: sizes.molecules.map(
      (content, k) => content - (k > 0 ? sizes.molecules[k - 1] : 0),
    ),
    inverseEdgeSpacing: sizes.edgeSpacing_m.map((width) => 1 / width),
    inverseEdges: sizes.edges_m.map((radius) => 1 / radius),
    backgroundMix: Float64Array.from(scenario.background.nucleusClasses.map(({ share }) => share)),
  }
}

/** Finds the occupied classes and reads the mixing ratios and the core mix of every level. */
export function readIce(
  work: IceWorkspace,
  y: ArrayLike<number>,
  start: { ice: number; cores: number },
  inverseDensity: Float64Array,
): void {
  const { levels, classes, nucleusClasses, occupied, q, mix, backgroundMix } = work
  for (let i = 0; i < levels; i++) {
    const row = i * classes
    const place = start.ice + row
    const inverse = inverseDensity[i]
    let count = classes
    while (count > 0 && Math.abs(y[place + count - 1]) < NO_ICE) count--
    for (let k = 0; k < count; k++) q[row + k] = y[place + k] * inverse
    for (let k = count; k < classes; k++) q[row + k] = 0
    occupied[i] = count
    let cores = 0
    const first = i * nucleusClasses
    for (let j = 0; j < nucleusClasses; j++) cores += y[start.cores + first + j]
    for (let j = 0; j < nucleusClasses; j++) {
      mix[first + j] = cores > NO_ICE ? y[start.cores + first + j] / cores : backgroundMix[j]
    }
  }
}
