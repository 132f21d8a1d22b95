import type { AirCoefficients } from '../airCoefficients.ts'
import type { Inflow } from './tracerTransport.ts'
import type { IceWorkspace } from './workspace.ts'

/**
 * Adds to dy the transport of the cores of one nucleus class inside the ice: the ice number carried through each
 * face takes the core mix of the cell it comes from; mixing and the lateral term act on the cores themselves,
 * so that the cores of all classes add up to the ice particles.
 */
export function transportCores(
  { level, face }: AirCoefficients,
  { levels, nucleusClasses, mix, carried }: IceWorkspace,
  state: { y: ArrayLike<number>; dy: number[]; start: number; spacing_m: number; member: number },
  inflow: Inflow,
): void {
  const { y, dy, start, spacing_m, member } = state
  const perSpacing = 1 / spacing_m
  // At the ends there is but one cell, whatever the sign that the solver's noise gives its ice.
  let fluxBelow = carried[0] * mix[member]
  inflow.bottom = fluxBelow
  let lateral = 0
  for (let i = 0; i < levels; i++) {
    const cell = i * nucleusClasses + member
    const next = cell + nucleusClasses
    const q = y[start + cell] * level.inverseDensity[i]
    const upward = carried[i + 1]
    const isInside = i < levels - 1
    let flux = upward * mix[isInside && upward < 0 ? next : cell]
    if (isInside) {
      flux -= face.eddy[i + 1] * (y[start + next] * level.inverseDensity[i + 1] - q)
    }
    const converged = q * level.lateral[i]
    dy[start + cell] += (fluxBelow - flux) * perSpacing + converged
    lateral += converged
    fluxBelow = flux
  }
  inflow.top = -fluxBelow
  inflow.lateral = lateral * spacing_m
}
