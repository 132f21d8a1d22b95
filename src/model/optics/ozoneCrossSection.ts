import { InputError } from '../errors.ts'
import type { OzoneRow } from './ozoneCrossSectionTable.ts'
import { ozoneCrossSectionTable } from './ozoneCrossSectionTable.ts'

/**
 * Absorption cross-section of one molecule of ozone at the coldest temperature measured, 218 K.
 *
 * A value measured at the very wavelength goes before the mean of a band around it; nothing is interpolated.
 *
 * @param wavelength_m wavelength, m
 * @returns cross-section, m2
 * @throws InputError where no value is held
 *
 * Source: Malicet et al. 1995 at 265 nm, JPL Publication 06-2 in the bands, see `ozoneCrossSectionTable`. Range: 250 to
 * 253.165 nm and 263.158 to 266.667 nm. Doubts: the mesopause is colder than anything measured; measurements differ by
 * 2 to 3 per cent, so 265 nm lies 2 per cent below the band around it.
 */
export function ozoneCrossSection(wavelength_m: number): number {
  // Nine digits: 265 nm must not miss its row by the rounding of its conversion to metres.
  const wavelength_nm = Number((wavelength_m * 1e9).toPrecision(9))
  const [best] = ozoneCrossSectionTable
    .filter(({ from_nm, to_nm }) => wavelength_nm >= from_nm && wavelength_nm <= to_nm)
    .sort((a, b) => width(a) - width(b) || a.temperature_K - b.temperature_K)
  if (!best) {
    throw new InputError(
      `wavelength ${wavelength_nm} nm: the absorption of ozone is known from 250 to 253.165 nm ` +
        'and from 263.158 to 266.667 nm only',
    )
  }
  return best.crossSection_cm2 * 1e-4
}

function width({ from_nm, to_nm }: OzoneRow): number {
  return to_nm - from_nm
}
