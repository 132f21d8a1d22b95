import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { InputError } from '../../../src/model/errors.ts'
import { iceRefractiveIndex } from '../../../src/model/optics/iceRefractiveIndex.ts'
import { iceRefractiveIndexTable } from '../../../src/model/optics/iceRefractiveIndexTable.ts'

describe('refractive index of ice', () => {
  it('returns the rows of the published table', () => {
    // Warren and Brandt 2008, J. Geophys. Res. 113, D14220: wavelength in um, n, k. Only rounding is left.
    const nodes: [number, number, number][] = [
      [0.199, 1.3943, 9.565e-11],
      [0.25, 1.3509, 2.0e-11],
      [0.3, 1.3339, 2.0e-11],
      [0.35, 1.3249, 2.0e-11],
      [0.53, 1.3117, 1.409e-9],
      [0.54, 1.3114, 1.813e-9],
      [0.58, 1.31, 4.159e-9],
      [1.06, 1.3005, 1.96e-6],
      [3.003, 1.039, 0.438],
      [3.077, 1.3215, 0.625],
      [3.096, 1.4225, 0.593],
      [3.195, 1.6477, 0.3],
      [9.091, 1.2655, 3.706e-2],
      [10, 1.1926, 5.008e-2],
      [11.9, 1.2546, 0.409],
      [15.15, 1.5637, 0.164],
    ]
    for (const [wavelength_um, n, k] of nodes) {
      const index = iceRefractiveIndex(wavelength_um * 1e-6)
      expect(index.n, `${wavelength_um} um`).toBeCloseTo(n, 10)
      expect(index.k / k, `${wavelength_um} um`).toBeCloseTo(1, 9)
    }
  })

  it('interpolates n and ln k linearly in the logarithm of the wavelength', () => {
    // Computed independently from the same table with the same rule: n to 1e-6, k to six digits.
    const values: [number, number, number][] = [
      [0.252, 1.350157, 2.0e-11],
      [0.265, 1.345467, 2.0e-11],
      [0.355, 1.324297, 2.0e-11],
      [0.532, 1.31164, 1.48242e-9],
      [0.589, 1.30973, 4.8475e-9],
      [1.064, 1.30042, 1.89839e-6],
      [2.45, 1.235194, 6.6284e-4],
      [3.064, 1.244533, 6.16084e-1],
      [3.08, 1.337489, 6.19822e-1],
      [3.2, 1.645896, 2.83091e-1],
      [9.0, 1.269976, 3.68244e-2],
      [10.6, 1.10308, 1.23923e-1],
      [12.0, 1.27638, 4.13324e-1],
    ]
    for (const [wavelength_um, n, k] of values) {
      const index = iceRefractiveIndex(wavelength_um * 1e-6)
      expect(Math.abs(index.n - n), `${wavelength_um} um`).toBeLessThanOrEqual(0.51e-6)
      expect(Math.abs(index.k / k - 1), `${wavelength_um} um`).toBeLessThan(5e-6)
    }
  })

  it('stays between its two neighbours everywhere', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.199, max: 15.15, noNaN: true }), (wavelength_um) => {
        const { n, k } = iceRefractiveIndex(wavelength_um * 1e-6)
        const upper = iceRefractiveIndexTable.findIndex((row) => row[0] >= wavelength_um)
        const near = iceRefractiveIndexTable.slice(Math.max(0, upper - 1), upper + 2)
        const tolerance = 1e-9
        expect(n).toBeGreaterThanOrEqual(Math.min(...near.map((row) => row[1])) - tolerance)
        expect(n).toBeLessThanOrEqual(Math.max(...near.map((row) => row[1])) + tolerance)
        expect(k).toBeGreaterThanOrEqual(Math.min(...near.map((row) => row[2])) * (1 - tolerance))
        expect(k).toBeLessThanOrEqual(Math.max(...near.map((row) => row[2])) * (1 + tolerance))
      }),
      { seed: 7, numRuns: 1000 },
    )
  })

  it('refuses a wavelength outside the table and names the range', () => {
    const message = /refractive index of ice is known from 0\.199 to 15\.15 um/
    for (const wavelength_m of [150e-9, 198.9e-9, 15.2e-6, 0, -1, Number.NaN]) {
      expect(() => iceRefractiveIndex(wavelength_m)).toThrow(InputError)
      expect(() => iceRefractiveIndex(wavelength_m)).toThrow(message)
    }
    expect(() => iceRefractiveIndex(150e-9)).toThrow(/^wavelength 0\.15 um: /)
  })

  it('holds a table of strictly rising wavelengths and positive values', () => {
    expect(iceRefractiveIndexTable.length).toBe(303)
    iceRefractiveIndexTable.forEach(([wavelength_um, n, k], i) => {
      expect(wavelength_um).toBeGreaterThan(iceRefractiveIndexTable[i - 1]?.[0] ?? 0)
      expect(n).toBeGreaterThan(0.9)
      expect(k).toBeGreaterThan(0)
    })
  })
})
