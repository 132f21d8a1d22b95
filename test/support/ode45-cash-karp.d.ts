/** The part of the outside solver that is used here; the package ships no declarations. */
declare module 'ode45-cash-karp' {
  interface Options {
    tol: number
    dtMaxMag: number
    verbose: boolean
    errorScaleFunction(index: number, dt: number, y: number, dydt: number): number
  }

  interface Integrator {
    y: number[]
    t: number
    /** One step; false at the limit. */
    step(limit: number): boolean
  }

  export default function ode45(
    y0: number[],
    derivative: (dydt: number[], y: number[], t: number) => void,
    t0: number,
    dt0: number,
    options: Partial<Options>,
  ): Integrator
}
