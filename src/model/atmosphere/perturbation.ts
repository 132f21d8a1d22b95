import type { AltitudeShape, Perturbation, TimeShape } from '../scenario/types.ts'

/** Weight of a change at an altitude: 1 inside, 0 outside, Gaussian exp(-(z - z_c)^2/(2 sigma^2)) where asked. */
export function altitudeWeight(shape: AltitudeShape, altitude_m: number): number {
  switch (shape.shape) {
    case 'everywhere':
      return 1
    case 'topHat':
      return altitude_m >= shape.from_m && altitude_m <= shape.to_m ? 1 : 0
    case 'gaussian':
      return Math.exp(-0.5 * ((altitude_m - shape.centre_m) / shape.sigma_m) ** 2)
  }
}

/** Strength of a change at a time, 0 to 1. At the very edge of a step or pulse it holds already. */
export function timeStrength(shape: TimeShape, time_s: number): number {
  switch (shape.shape) {
    case 'always':
      return 1
    case 'step':
      return time_s >= shape.start_s ? 1 : 0
    case 'pulse':
      return time_s >= shape.start_s && time_s < shape.end_s ? 1 : 0
    case 'ramp': {
      const rise = (time_s - shape.start_s) / shape.rise_s
      const fall = (shape.end_s - time_s) / shape.rise_s
      return Math.max(0, Math.min(1, rise, fall))
    }
  }
}

/** Instants at which the strength has a jump or a kink: break points of the integration, s. */
export function timeEdges(shape: TimeShape): number[] {
  switch (shape.shape) {
    case 'always':
      return []
    case 'step':
      return [shape.start_s]
    case 'pulse':
      return [shape.start_s, shape.end_s]
    case 'ramp':
      return [
        shape.start_s,
        shape.start_s + shape.rise_s,
        shape.end_s - shape.rise_s,
        shape.end_s,
      ].filter(Number.isFinite)
  }
}

/** Whether a perturbation changes nothing, not even by rounding. */
export function isNeutral({ mode, amount }: Perturbation): boolean {
  return amount === (mode === 'add' ? 0 : 1)
}

/** What a perturbation makes of a value: value + amount w, or value (1 + (factor - 1) w), with weight w. */
export function perturbed(change: Perturbation, value: number, weight: number): number {
  return change.mode === 'add'
    ? value + change.amount * weight
    : value * (1 + (change.amount - 1) * weight)
}
