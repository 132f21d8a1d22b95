import { crossSectionTable } from '../optics/crossSectionTable.ts'
import { mieCrossSection } from '../optics/mieCrossSection.ts'
import { rayleighCrossSection } from '../optics/rayleighCrossSection.ts'
import type { Channel } from '../scenario/types.ts'
import type { Column } from '../state/column.ts'

/** Differential cross-sections of one channel for every radius class, m2/sr. */
export interface LightTable {
  channel: Channel
  rayleigh: Float64Array
  mie: Float64Array
  /** Secant of the view zenith angle; 1 for a lidar. */
  slant: number
}

/** Made once per run: every brightness stands twice, in the Rayleigh limit and for true spheres (Lorenz-Mie). */
export function makeLightTables({ scenario, sizes }: Column): LightTable[] {
  return scenario.channels.map((channel) => {
    const { geometry, wavelength_m, refractiveIndex } = channel
    const albedo = geometry.kind === 'albedo'
    const scatteringAngle_rad = albedo ? geometry.scatteringAngle_rad : Math.PI
    const light = { wavelength_m, refractiveIndex, scatteringAngle_rad }
    return {
      channel,
      rayleigh: crossSectionTable(rayleighCrossSection, sizes.radii_m, light),
      mie: crossSectionTable(mieCrossSection, sizes.radii_m, light),
      slant: albedo ? 1 / Math.cos(geometry.viewZenith_rad) : 1,
    }
  })
}
