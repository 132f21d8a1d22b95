import { InputError } from '../errors.ts'
import { iceRefractiveIndexTable } from './iceRefractiveIndexTable.ts'
import type { RefractiveIndex } from './refractiveIndex.ts'

/**
 * Refractive index n + ik of hexagonal ice.
 *
 *   n is linear in ln lambda, ln k is linear in ln lambda between the rows of the table
 *
 * @param wavelength_m wavelength in vacuum, m
 * @returns n and k, 1
 * @throws InputError outside the table
 *
 * Source: Warren and Brandt 2008, J. Geophys. Res. 113, D14220; the rule of interpolation is this program's own.
 * Range: 0.199 to 15.15 um as stored. Doubts: k from 0.2019 to 0.390 um is a placeholder for 'extremely low'; the table
 * is for ice near melting, mid-infrared bands differ at 130 to 160 K.
 */
export function iceRefractiveIndex(wavelength_m: number): RefractiveIndex {
  // Twelve digits: 199 nm must not fall out of the table by the rounding of its conversion to metres.
  const wavelength_um = Number((wavelength_m * 1e6).toPrecision(12))
  const table = iceRefractiveIndexTable
  const upper = Math.max(
    1,
    table.findIndex(([tabulated]) => tabulated >= wavelength_um),
  )
  const below = table[upper - 1]
  const above = table[upper]
  if (!below || !above || !(wavelength_um >= below[0] && wavelength_um <= above[0])) {
    throw new InputError(
      `wavelength ${wavelength_um} um: the refractive index of ice is known from ` +
        `${table[0]?.[0]} to ${table.at(-1)?.[0]} um`,
    )
  }
  const share = Math.log(wavelength_um / below[0]) / Math.log(above[0] / below[0])
  return {
    n: below[1] + share * (above[1] - below[1]),
    k: below[2] * (above[2] / below[2]) ** share,
  }
}
