import { centrePoint } from '../../grid.ts'
import type { Column } from '../../state/column.ts'
import type { StateLayout } from '../../state/layout.ts'
import type { Situation } from './situation.ts'

/** One quantity that the air carries: where its cells lie in the state and in which accounts it is booked. */
export interface Tracer {
  kind: 'vapour' | 'nuclei' | 'ice' | 'cores'
  /** Which nucleus or size class. */
  member: number
  /** Index of the lowest cell, and distance between the cells of neighbouring levels. */
  start: number
  stride: number
  /** Amount booked per particle: water molecules in ice, 1 for the others. */
  content: number
  accounts: { floor: number; top: number; lateral: number }
}

/** All tracers of a column. */
export function listTracers({ layout, sizes }: Column): Tracer[] {
  const { classes, nucleusClasses, waterAccount: water } = layout
  const ofNucleusClass = (kind: 'nuclei' | 'cores', member: number): Tracer => ({
    kind,
    member,
    start: layout[kind] + member,
    stride: nucleusClasses,
    content: 1,
    accounts: nucleusAccounts(layout, kind === 'nuclei' ? 'bottom' : 'fallout', member),
  })
  const members = Array.from({ length: nucleusClasses }, (_, j) => j)
  return [
    {
      kind: 'vapour',
      member: 0,
      start: layout.vapour,
      stride: 1,
      content: 1,
      accounts: { floor: water.bottom, top: water.top, lateral: water.lateral },
    },
    ...members.map((j) => ofNucleusClass('nuclei', j)),
    ...Array.from(
      sizes.molecules,
      (content, k): Tracer => ({
        kind: 'ice',
        member: k,
        start: layout.ice + k,
        stride: classes,
        content,
        accounts: { floor: water.fallout, top: water.top, lateral: water.lateral },
      }),
    ),
    ...members.map((j) => ofNucleusClass('cores', j)),
  ]
}

function nucleusAccounts(
  { nucleusAccount }: StateLayout,
  floor: 'bottom' | 'fallout',
  member: number,
): Tracer['accounts'] {
  return {
    floor: nucleusAccount[floor] + member,
    top: nucleusAccount.top + member,
    lateral: nucleusAccount.lateral + member,
  }
}

/** Mixing ratios of a tracer from the cell outside below to the cell outside above, levels + 2 values. */
export function mixingRatios(
  now: Situation,
  { kind, member, start, stride }: Tracer,
): Float64Array {
  const { column, rest, air, y } = now
  const { levels } = column.grid
  const q = new Float64Array(levels + 2)
  for (let i = 0; i < levels; i++) {
    q[i + 1] = y[start + i * stride] / rest.density_per_m3[centrePoint(i)]
  }
  const top = air.water.length - 1
  const share = kind === 'nuclei' ? column.scenario.background.nucleusClasses[member].share : 0
  if (kind === 'vapour') [q[0], q[levels + 1]] = [air.water[0], air.water[top]]
  else if (kind === 'nuclei')
    [q[0], q[levels + 1]] = [air.nuclei[0] * share, air.nuclei[top] * share]
  else [q[0], q[levels + 1]] = [q[1], q[levels]]
  return q
}

/** Adds -dF/dz for the upward fluxes F through all faces, and books what passes the ends of the column. */
export function addFluxes(
  { column }: Situation,
  { start, stride, content, accounts }: Tracer,
  flux: Float64Array,
  dy: Float64Array,
): void {
  const { levels, spacing_m } = column.grid
  for (let i = 0; i < levels; i++) dy[start + i * stride] -= (flux[i + 1] - flux[i]) / spacing_m
  dy[accounts.floor] += flux[0] * content
  dy[accounts.top] -= flux[levels] * content
}
