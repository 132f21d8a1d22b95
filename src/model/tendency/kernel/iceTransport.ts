import { halfVanLeerSlope } from '../../numerics/halfVanLeerSlope.ts'
import type { AirCoefficients } from '../airCoefficients.ts'
import type { Inflow } from './tracerTransport.ts'
import type { IceWorkspace } from './workspace.ts'

/**
 * Sets the gain of the ice by fall, transport by the mean wind, and mixing:
 *   d(n0 q)/dt = -d(n0 [w - v(r)/(1 + Z)] q)/dz + q d(n0 w)/dz + d/dz [n0 K/(1 + Z)^2 dq/dz]
 * for every class; fall and wind share one van Leer-limited upwind face value, the outermost cells are taken as flat.
 * Ice enters nowhere and leaves through the bottom by falling, through the top by a wind that outruns its fall.
 * `inflow` receives the water that came in (negative: left), molecules/(m2 s).
 */
export function transportIce(
  coefficients: AirCoefficients,
  work: IceWorkspace,
  spacing_m: number,
  inflow: Inflow,
): void {
  const { levels } = work
  work.halfSlope.fill(0)
  inflow.bottom = leave(coefficients, work, { face: 0, level: 0, direction: -1 })
  inflow.lateral = 0
  for (let i = 0; i < levels - 1; i++) {
    inflow.lateral += crossFace(coefficients, work, i, 1 / spacing_m) * spacing_m
  }
  const lateral = closeTop(coefficients, work, 1 / spacing_m, inflow)
  inflow.lateral += lateral * spacing_m
}

/** Closes the account of a level with the flux through the face above it; returns the water of its lateral term. */
function crossFace(
  { face, level }: AirCoefficients,
  work: IceWorkspace,
  i: number,
  perSpacing: number,
): number {
  const { levels, classes, occupied, q, gain, radii, molecules, halfSlope, fluxBelow } = work
  const f = i + 1
  const wind = face.wind[f]
  const fall1 = face.fall1[f]
  const fall2 = face.fall2[f]
  const fall3 = face.fall3[f]
  const eddy = face.eddy[f]
  const lateral = level.lateral[i]
  const below = i * classes
  const above = below + classes
  const beyond = f < levels - 1 ? above + classes : above
  const count = Math.max(occupied[i], occupied[f])
  const touched = i > 0 ? Math.max(occupied[i - 1], count) : classes
  work.touched[i] = touched
  let carried = 0
  let content = 0
  for (let k = 0; k < count; k++) {
    const r = radii[k]
    const speed = wind - r * (fall1 + r * (fall2 + r * fall3))
    const qBelow = q[below + k]
    const qAbove = q[above + k]
    const change = qAbove - qBelow
    const halfSlopeAbove = halfVanLeerSlope(change, q[beyond + k] - qAbove)
    const moved = speed * (speed > 0 ? qBelow + halfSlope[k] : qAbove - halfSlopeAbove)
    const flux = moved - eddy * change
    gain[below + k] = (fluxBelow[k] - flux) * perSpacing + qBelow * lateral
    fluxBelow[k] = flux
    halfSlope[k] = halfSlopeAbove
    carried += moved
    content += qBelow * molecules[k]
  }
  for (let k = count; k < touched; k++) {
    gain[below + k] = fluxBelow[k] * perSpacing
    fluxBelow[k] = 0
    halfSlope[k] = 0
  }
  work.carried[f] = carried
  return content * lateral
}

/** Closes the account of the topmost level; returns the water of its lateral term. */
function closeTop(
  coefficients: AirCoefficients,
  work: IceWorkspace,
  perSpacing: number,
  inflow: Inflow,
): number {
  const { levels, classes, q, gain, fluxBelow, molecules } = work
  const arriving = fluxBelow.slice()
  inflow.top = -leave(coefficients, work, { face: levels, level: levels - 1, direction: 1 })
  const lateral = coefficients.level.lateral[levels - 1]
  const row = (levels - 1) * classes
  work.touched[levels - 1] = classes
  let content = 0
  for (let k = 0; k < classes; k++) {
    gain[row + k] = (arriving[k] - fluxBelow[k]) * perSpacing + q[row + k] * lateral
    content += q[row + k] * molecules[k]
  }
  return content * lateral
}

/** Sets the outflow through an end of the column; returns the upward flux of water, molecules/(m2 s). */
function leave(
  { face }: AirCoefficients,
  { classes, occupied, q, radii, molecules, carried, fluxBelow }: IceWorkspace,
  end: { face: number; level: number; direction: 1 | -1 },
): number {
  const f = end.face
  const row = end.level * classes
  fluxBelow.fill(0)
  let total = 0
  let water = 0
  for (let k = 0; k < occupied[end.level]; k++) {
    const r = radii[k]
    const speed = face.wind[f] - r * (face.fall1[f] + r * (face.fall2[f] + r * face.fall3[f]))
    if (speed * end.direction <= 0) continue
    const flux = speed * q[row + k]
    fluxBelow[k] = flux
    total += flux
    water += flux * molecules[k]
  }
  carried[f] = total
  return water
}
