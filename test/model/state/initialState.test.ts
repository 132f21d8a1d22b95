import { describe, expect, it } from 'vitest'
import { centrePoint } from '../../../src/model/grid.ts'
import { initialSnapshot } from '../../../src/model/simulate.ts'
import { columnTotals } from '../../../src/model/state/columnTotals.ts'
import { columnOf, uniform } from '../../support/column.ts'

/** A layer with invented numbers: 1 km wide at half maximum, 80 per cm3, 40 nm, on fine axes. */
const layer = {
  altitude_km: 84,
  width_km: 1,
  number_per_cm3: 80,
  median_radius_nm: 40,
  geometric_width: 1.25,
}
const column = columnOf({
  grid: { levels: 190 },
  sizes: { classes: 192 },
  water: uniform('water_ppmv', 3),
  nuclei: {
    ...uniform('nuclei_per_cm3', 1000),
    classes: [
      { radius_nm: 1, share: 3 },
      { radius_nm: 2, share: 1 },
    ],
  },
  initial: { ice: [layer] },
})
const { layout, sizes, grid } = column
const { y } = initialSnapshot(column)

describe('initialState', () => {
  it('starts from the mixing ratio of vapour and the number density of nuclei', () => {
    const { density_per_m3 } = column.atmosphere.basis(0).rest
    for (let i = 0; i < layout.levels; i++) {
      expect(y[layout.vapour + i] / density_per_m3[centrePoint(i)]).toBeCloseTo(3e-6, 16)
      expect(y[layout.nuclei + 2 * i] / 0.75e9).toBeCloseTo(1, 12)
      expect(y[layout.nuclei + 2 * i + 1] / 0.25e9).toBeCloseTo(1, 12)
    }
  })

  it('holds as many particles as the Gaussian layer, each with one core', () => {
    let ice = 0
    for (let index = layout.ice; index < layout.cores; index++) ice += y[index] * grid.spacing_m
    let cores = 0
    for (let index = layout.cores; index < layout.waterAccount.top; index++) {
      cores += y[index] * grid.spacing_m
    }
    // Integral of the Gaussian: peak sigma sqrt(2 pi), sigma = width/(2 sqrt(2 ln 2)); spectrally exact sums.
    const expected = (80e6 * 1000 * Math.sqrt(2 * Math.PI)) / (2 * Math.sqrt(2 * Math.LN2))
    expect(ice / expected).toBeCloseTo(1, 9)
    expect(cores / ice).toBeCloseTo(1, 12)
  })

  it('has the mean radius and the mean volume of the log-normal', () => {
    const level = grid.centres_m.findIndex((z) => z > 84_000)
    const numbers = y.subarray(
      layout.ice + level * sizes.count,
      layout.ice + (level + 1) * sizes.count,
    )
    const moment = (power: number) =>
      numbers.reduce((sum, N, k) => sum + N * sizes.radii_m[k] ** power, 0) /
      numbers.reduce((sum, N) => sum + N, 0)
    const variance = Math.log(1.25) ** 2
    // <r^p> = median^p exp(p^2 variance/2); 1e-3: classes of about 1 nm.
    expect(moment(1) / (40e-9 * Math.exp(variance / 2))).toBeCloseTo(1, 3)
    expect(moment(3) / (40e-9 ** 3 * Math.exp(4.5 * variance))).toBeCloseTo(1, 3)
  })
})

describe('columnTotals', () => {
  it('counts the water of ice as spheres of the density of ice', () => {
    const { ice } = columnTotals(y, column)
    // (4/3) pi r^3 932 kg/m3 over 18.01528 g/mol, with the mean cube of the log-normal, times the particles per area.
    const particles = (80e6 * 1000 * Math.sqrt(2 * Math.PI)) / (2 * Math.sqrt(2 * Math.LN2))
    const cube = 40e-9 ** 3 * Math.exp(4.5 * Math.log(1.25) ** 2)
    const molecules = ((4 / 3) * Math.PI * cube * 932 * 6.02214076e23) / 18.01528e-3
    expect(ice / (particles * molecules)).toBeCloseTo(1, 3)
  })

  it('counts nuclei free and inside ice', () => {
    const { nuclei } = columnTotals(y, column)
    const free = 0.75e9 * 19_000
    const particles = (80e6 * 1000 * Math.sqrt(2 * Math.PI)) / (2 * Math.sqrt(2 * Math.LN2))
    expect(nuclei[0] / (free + 0.75 * particles)).toBeCloseTo(1, 9)
  })
})
