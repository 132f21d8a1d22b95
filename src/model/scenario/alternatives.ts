import { profileForms, profileQuantities } from './profileQuantities.ts'

/** Groups of keys that exclude each other: choosing one in an extending scenario drops what the other one said. */
const profileAlternatives = profileForms.map((form) => [form])

const alternatives: Record<string, readonly (readonly string[])[][]> = {
  ...Object.fromEntries(
    Object.keys(profileQuantities).map((name) => [name, [profileAlternatives]]),
  ),
  water: [profileAlternatives, [['factor'], ['at_83km_ppmv']]],
  'temperature.measured': [[['file'], ['time_h', 'altitude_km', 'temperature_K']]],
}

/**
 * The keys of a section that a newly chosen key excludes.
 * @param section dotted path of the section, such as 'temperature'
 */
export function excludedBy(section: string, key: string): readonly string[] {
  const groups = Object.hasOwn(alternatives, section) ? alternatives[section] : []
  const group = groups.find((options) => options.some((keys) => keys.includes(key))) ?? []
  return group.filter((keys) => !keys.includes(key)).flat()
}
