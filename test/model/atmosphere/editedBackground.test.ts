import { describe, expect, it } from 'vitest'
import { AIR_MOLECULE_MASS, BOLTZMANN } from '../../../src/model/constants.ts'
import { centrePoint } from '../../../src/model/grid.ts'
import { gravity } from '../../../src/model/processes/gravity.ts'
import { columnOf, uniform } from '../../support/column.ts'

/** Isothermal air of 140 K hung on 0.2 Pa at 88 km, in 38 cells, and the change of 5 K. */
const cold = { grid: { levels: 38 }, pressure: { altitude_km: 88, pressure_Pa: 0.2 } }

function airOf(document: object) {
  const { atmosphere, grid } = columnOf({ ...cold, ...document })
  const basis = atmosphere.basis(0)
  const { temperature_K, pressure_Pa } = atmosphere.read(basis, 0, { from_s: 0, to_s: 600 })
  return { grid, rest: basis.rest, temperature_K, pressure_Pa }
}

const plain = { temperature: uniform('temperature_K', 140) }
const before = airOf(plain)
const edited = airOf({ temperature: { ...plain.temperature, offset_K: 5 } })
const perturbed = airOf({ ...plain, perturbations: [{ quantity: 'temperature', add_K: 5 }] })

/** Halfway through the column, near 81 km: below the reference altitude. */
const POINT = centrePoint(8)

describe('a change of temperature', () => {
  it('is the same temperature for an edited background and a perturbation', () => {
    edited.temperature_K.forEach((T, i) => {
      expect(T).toBeCloseTo(145, 10)
      expect(perturbed.temperature_K[i]).toBeCloseTo(145, 10)
    })
  })

  it('leaves density and pressure alone as a perturbation', () => {
    expect(perturbed.pressure_Pa).toEqual(before.pressure_Pa)
    expect(perturbed.rest.density_per_m3).toEqual(before.rest.density_per_m3)
  })

  it('solves hydrostatic balance again as an edited background', () => {
    const z = edited.grid.halfPoints_m[POINT]
    const weight = (AIR_MOLECULE_MASS * gravity((z + 88e3) / 2) * (88e3 - z)) / BOLTZMANN
    // Warmer air is thicker: less pressure below the altitude that holds the reference pressure.
    const expected = Math.exp(weight * (1 / 145 - 1 / 140))
    // 1e-6: gravity at the middle of the layer for its mean.
    expect(edited.pressure_Pa[POINT] / before.pressure_Pa[POINT]).toBeCloseTo(expected, 6)
    expect(expected).toBeLessThan(0.96)
    expect(edited.rest.density_per_m3[POINT] / before.rest.density_per_m3[POINT]).toBeCloseTo(
      (expected * 140) / 145,
      6,
    )
  })
})
