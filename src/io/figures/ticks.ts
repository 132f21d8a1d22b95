import type { ScaleLinear, ScaleLogarithmic } from 'd3-scale'
import type { Tick } from './axis.ts'
import { raised } from './unitText.ts'

/** Round marks of a linear scale. */
export function linearTicks(scale: ScaleLinear<number, number>, count: number): Tick[] {
  const label = scale.tickFormat(count)
  return scale.ticks(count).map((value) => ({ at: scale(value), label: label(value) }))
}

/** Marks at multiples of a step, such as six hours. */
export function steppedTicks(scale: ScaleLinear<number, number>, step: number): Tick[] {
  const [first, last] = scale.domain()
  const start = Math.ceil(first / step)
  const count = Math.floor(last / step) - start + 1
  return Array.from({ length: count }, (_, i) => (start + i) * step).map((value) => ({
    at: scale(value),
    label: String(value),
  }))
}

/** Marks at the powers of ten. */
export function decadeTicks(scale: ScaleLogarithmic<number, number>): Tick[] {
  const [first, last] = scale.domain().map(Math.log10)
  const start = Math.ceil(first - 1e-9)
  const count = Math.floor(last + 1e-9) - start + 1
  return Array.from({ length: count }, (_, i) => ({
    at: scale(10 ** (start + i)),
    label: `10${raised(start + i)}`,
  }))
}

/** The step, in hours, that marks a run of some length in four to eight places. */
export function hourStep(duration_h: number): number {
  const steps = [0.25, 0.5, 1, 2, 3, 6, 12, 24, 48, 120, 240, 480]
  return steps.find((step) => duration_h / step <= 8) ?? 960
}
