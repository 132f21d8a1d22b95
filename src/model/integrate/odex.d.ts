/** The part of odex 3.0 that is used here; the package ships TypeScript source and no declarations. */
export interface Options {
  maxSteps: number
  initialStepSize: number
  maxStepSize: number
  maxExtrapolationColumns: number
  stabilityCheckCount: number
  denseOutput: boolean
  relativeTolerance: number | number[]
  absoluteTolerance: number | number[]
  rawFunction: boolean
}

export interface SolutionSegment {
  x0: number
  x1: number
  y: number[]
}

export class Solver {
  constructor(
    derivative: (x: number, y: number[], out: number[]) => void,
    dimension: number,
    options: Partial<Options>,
  )
  solutionSegments(
    x: number,
    y0: number[],
    xEnd: number,
  ): Generator<SolutionSegment, undefined, unknown>
}
