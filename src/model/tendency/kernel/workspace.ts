import type { Column } from '../../state/column.ts'
import type { StateLayout } from '../../state/layout.ts'
import { NO_ICE } from '../noIce.ts'

/** Scratch of the fast right-hand side, made once. */
export interface IceWorkspace {
  levels: number
  classes: number
  nucleusClasses: number
  /** Number of classes up to the largest that holds ice, per level. */
  occupied: Int32Array
  /**
   * Mixing ratios: a row of classes + 1 per level, zero beyond the occupied ones. The last entry of a row repeats the
   * largest class, so that the limiter takes it as flat.
   */
  q: Float64Array
  rowWidth: number
  /** What the ice gains, in the order of the state, 1/(m3 s); handed over to dy when complete. */
  gain: Float64Array
  /** Number of classes whose gain may differ from zero, per level. */
  touched: Int32Array
  /** Half the limited change across the cells below the face being crossed, per class. */
  halfSlope: Float64Array
  /** Upward flux through the face below the level being closed, per class, 1/(m2 s). */
  fluxBelow: Float64Array
  /** Share of each nucleus class in the cores of a level. */
  mix: Float64Array
  /** Ice particles carried upward through each face by wind and fall, 1/(m2 s). */
  carried: Float64Array
  molecules: Float64Array
  /** Inverse spacing of the classes around their lower edges, 1/m. */
  inverseEdgeSpacing: Float64Array
  /** Water in one particle more than in one of the class below, molecules. */
  moleculeSteps: Float64Array
  /** Shares of the nucleus classes in the background: the mix where there is no ice. */
  backgroundMix: Float64Array
}

export function makeIceWorkspace({ grid, sizes, layout, scenario }: Column): IceWorkspace {
  const { levels } = grid
  const { nucleusClasses, classes } = layout
  const rowWidth = classes + 1
  return {
    levels,
    classes,
    nucleusClasses,
    occupied: new Int32Array(levels),
    q: new Float64Array(levels * rowWidth),
    rowWidth,
    gain: new Float64Array(levels * classes),
    touched: new Int32Array(levels),
    halfSlope: new Float64Array(classes),
    fluxBelow: new Float64Array(classes),
    mix: new Float64Array(levels * nucleusClasses),
    carried: new Float64Array(levels + 1),
    molecules: sizes.molecules,
    inverseEdgeSpacing: sizes.edgeSpacing_m.map((width) => 1 / width),
    moleculeSteps: sizes.molecules.map(
      (content, k) => content - (k > 0 ? sizes.molecules[k - 1] : 0),
    ),
    backgroundMix: Float64Array.from(scenario.background.nucleusClasses.map(({ share }) => share)),
  }
}

/** Finds the occupied classes and reads the mixing ratios of every level. */
export function makeIceReader(work: IceWorkspace, { ice }: StateLayout) {
  const { levels, classes, rowWidth, occupied, q } = work
  return (y: ArrayLike<number>, inverseDensity: Float64Array): void => {
    for (let i = 0; i < levels; i++) {
      const row = i * rowWidth
      const place = ice + i * classes
      const inverse = inverseDensity[i]
      let count = classes
      while (count > 0 && Math.abs(y[place + count - 1]) < NO_ICE) count--
      for (let k = 0; k < count; k++) q[row + k] = y[place + k] * inverse
      // Beyond what was occupied before, the row is zero already.
      for (let k = count; k < occupied[i]; k++) q[row + k] = 0
      q[row + classes] = q[row + classes - 1]
      occupied[i] = count
    }
  }
}

/**
 * Reads the core mix of every level. Negative numbers, which the solver leaves within its tolerance, count as none:
 * shares of any other sum of nearly nothing would be huge.
 */
export function makeCoreMixReader(work: IceWorkspace, start: StateLayout) {
  const { levels, nucleusClasses, mix, backgroundMix } = work
  return (y: ArrayLike<number>): void => {
    for (let i = 0; i < levels; i++) {
      const first = i * nucleusClasses
      const place = start.cores + first
      let cores = 0
      for (let j = 0; j < nucleusClasses; j++) cores += Math.max(y[place + j], 0)
      for (let j = 0; j < nucleusClasses; j++) {
        mix[first + j] = cores > NO_ICE ? Math.max(y[place + j], 0) / cores : backgroundMix[j]
      }
    }
  }
}

/** Writes the gain of the ice to dy. */
export function makeGainWriter({ gain }: IceWorkspace, { ice }: StateLayout) {
  return (dy: number[]): void => {
    for (let cell = 0; cell < gain.length; cell++) dy[ice + cell] = gain[cell]
  }
}
