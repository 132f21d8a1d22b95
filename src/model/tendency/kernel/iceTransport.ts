import { halfVanLeerSlope } from '../../numerics/halfVanLeerSlope.ts'
import type { AirCoefficients } from '../airCoefficients.ts'
import type { Inflow } from './tracerTransport.ts'
import type { IceWorkspace } from './workspace.ts'

/**
 * Sets the gain of the ice to that by fall, transport by the mean wind and mixing:
 *   d(n0 q)/dt = -d(n0 [w - v(r)/(1 + Z)] q)/dz + q d(n0 w)/dz + d/dz [n0 K/(1 + Z)^2 dq/dz]
 * for every class; fall and wind share one van Leer-limited upwind face value, the outermost cells are taken as flat.
 * Ice enters nowhere and leaves through the bottom by falling, through the top by a wind that outruns its fall.
 * `inflow` receives the water that came in (negative: left), molecules/(m2 s).
 */
export function makeIceTransport(work: IceWorkspace, spacing_m: number) {
  const { classes, gain, fluxBelow } = work
  const top = work.levels - 1
  const leave = makeOutflow(work)
  const crossFace = makeFaceCrossing(work, spacing_m)
  const settleTail = makeTailSettling(work, spacing_m)
  const closeTop = makeTopClosing(work, spacing_m)
  return (air: AirCoefficients, inflow: Inflow): void => {
    inflow.bottom = leave(air, { face: 0, level: 0, direction: -1 })
    let lateral = 0
    for (let i = 0; i < top; i++) {
      lateral += crossFace(air, i)
      settleTail(i)
    }
    lateral += closeTop(air)
    inflow.top = -leave(air, { face: top + 1, level: top, direction: 1 })
    for (let k = 0; k < classes; k++) gain[top * classes + k] -= fluxBelow[k] / spacing_m
    inflow.lateral = lateral * spacing_m
  }
}

/**
 * Sets the gain of a level in the classes that hold ice on either side of the face above it; returns the water of its
 * lateral term, molecules/(m3 s).
 */
function makeFaceCrossing(work: IceWorkspace, spacing_m: number) {
  const { levels, classes, rowWidth, occupied, q, gain, halfSlope, fluxBelow } = work
  const { carried, molecules } = work
  const perSpacing = 1 / spacing_m
  return ({ face, level, ice }: AirCoefficients, i: number): number => {
    const { speed } = ice
    const f = i + 1
    const eddy = face.eddy[f]
    const lateral = level.lateral[i]
    const place = i * classes
    const across = f * classes
    const below = i * rowWidth
    const above = below + rowWidth
    const beyond = f < levels - 1 ? above + rowWidth : above
    const count = Math.max(occupied[i], occupied[f])
    let particles = 0
    let content = 0
    for (let k = 0; k < count; k++) {
      const upward = speed[across + k]
      const qBelow = q[below + k]
      const qAbove = q[above + k]
      const change = qAbove - qBelow
      const halfSlopeAbove = halfVanLeerSlope(change, q[beyond + k] - qAbove)
      const moved = upward * (upward > 0 ? qBelow + halfSlope[k] : qAbove - halfSlopeAbove)
      const flux = moved - eddy * change
      gain[place + k] = (fluxBelow[k] - flux) * perSpacing + qBelow * lateral
      fluxBelow[k] = flux
      halfSlope[k] = halfSlopeAbove
      particles += moved
      content += qBelow * molecules[k]
    }
    carried[f] = particles
    return content * lateral
  }
}

/** Sets the gain of the larger classes of a level: what comes from below, where anything does, and else nothing. */
function makeTailSettling(work: IceWorkspace, spacing_m: number) {
  const { classes, occupied, gain, touched, halfSlope, fluxBelow } = work
  return (i: number): void => {
    const place = i * classes
    const count = Math.max(occupied[i], occupied[i + 1])
    const arriving = i > 0 ? Math.max(occupied[i - 1], count) : count
    for (let k = count; k < arriving; k++) {
      gain[place + k] = fluxBelow[k] / spacing_m
      fluxBelow[k] = 0
      halfSlope[k] = 0
    }
    for (let k = arriving; k < touched[i]; k++) gain[place + k] = 0
    // Growth reaches one class beyond what arrives.
    touched[i] = Math.min(arriving + 1, classes)
  }
}

/** The topmost level: its gain by all but the flux through the top; returns the water of its lateral term. */
function makeTopClosing(work: IceWorkspace, spacing_m: number) {
  const { levels, classes, rowWidth, q, gain, fluxBelow, molecules } = work
  const top = levels - 1
  return ({ level }: AirCoefficients): number => {
    let content = 0
    for (let k = 0; k < classes; k++) {
      const cell = q[top * rowWidth + k]
      gain[top * classes + k] = fluxBelow[k] / spacing_m + cell * level.lateral[top]
      content += cell * molecules[k]
    }
    return content * level.lateral[top]
  }
}

/** Sets the flux through an end of the column; returns its water, upward, molecules/(m2 s). */
function makeOutflow(work: IceWorkspace) {
  const { classes, rowWidth, occupied, q, molecules, carried, halfSlope, fluxBelow } = work
  return (
    { ice }: AirCoefficients,
    end: { face: number; level: number; direction: 1 | -1 },
  ): number => {
    halfSlope.fill(0)
    fluxBelow.fill(0)
    let particles = 0
    let water = 0
    for (let k = 0; k < occupied[end.level]; k++) {
      const upward = ice.speed[end.face * classes + k]
      if (upward * end.direction <= 0) continue
      const flux = upward * q[end.level * rowWidth + k]
      fluxBelow[k] = flux
      particles += flux
      water += flux * molecules[k]
    }
    carried[end.face] = particles
    return water
  }
}
