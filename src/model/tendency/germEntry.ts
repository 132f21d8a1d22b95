import { moleculesInSphere, type RadiusClasses } from '../grid.ts'

/** Where a new particle enters the ice classes: shares of the two classes that bracket its radius. */
export interface GermEntry {
  lowerClass: number
  upperShare: number
}

/**
 * Divides a new particle between the two classes that bracket its outer radius, conserving number and volume.
 * Below the smallest class it enters that one, above the largest the largest. The core counts as ice.
 */
export function germEntry(
  radius_m: number,
  { count, molecules, position }: RadiusClasses,
  density: number,
): GermEntry {
  const place = position(radius_m)
  if (!(place > 0)) return { lowerClass: 0, upperShare: 0 }
  if (place >= count - 1) {
    return { lowerClass: count - 2, upperShare: 1 }
  }
  const lowerClass = Math.floor(place)
  const [lower, upper] = [molecules[lowerClass], molecules[lowerClass + 1]]
  const content = Math.min(Math.max(moleculesInSphere(radius_m, density), lower), upper)
  return { lowerClass, upperShare: (content - lower) / (upper - lower) }
}
