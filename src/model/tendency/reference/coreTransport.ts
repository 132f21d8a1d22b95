import { coreMix } from './coreMix.ts'
import type { Situation } from './situation.ts'
import { addFluxes, listTracers } from './tracers.ts'
import { motionFlux } from './verticalMotion.ts'

/**
 * Cores go where their ice goes:
 *   dM_j/dt = -d(F m_j)/dz,  F = sum over radii of the ice flux by wind and fall, m_j the core mix of the cell that
 * the net flux comes from. Mixing and the lateral term act on the cores themselves.
 */
export function coreTransport(now: Situation, dy: Float64Array): void {
  const { levels } = now.column.grid
  const tracers = listTracers(now.column)
  const carried = new Float64Array(levels + 1)
  for (const ice of tracers.filter(({ kind }) => kind === 'ice')) {
    motionFlux(now, ice).forEach((flux, face) => {
      carried[face] += flux
    })
  }
  const mix = Array.from({ length: levels }, (_, level) => coreMix(now, level))
  for (const cores of tracers.filter(({ kind }) => kind === 'cores')) {
    const flux = carried.map((upward, face) => {
      // At the ends there is but one cell, whatever the sign that the solver's noise gives its ice.
      const from = Math.min(Math.max(upward > 0 ? face - 1 : face, 0), levels - 1)
      return upward * mix[from][cores.member]
    })
    addFluxes(now, cores, flux, dy)
  }
}
