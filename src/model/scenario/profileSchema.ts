/**
 * Vertical profiles as users write them: knots, a table, a CSV file, or a series of knots or tables in time.
 */
import { z } from 'zod'
import {
  mixingDefaults,
  nucleusDefaults,
  photolysisDefaults,
  temperatureDefaults,
  waterDefaults,
  windDefaults,
} from './defaults.ts'
import { altitude, given, optionalNumber, quantity, section, toggle } from './fields.ts'
import {
  altitudeUnits,
  type ProfileQuantity,
  profileQuantities,
  timeUnits,
} from './profileQuantities.ts'

const MOST_ROWS = 10_000
const MOST_TIMES = 2000

function column(what: string, units: Record<string, number>) {
  const names = Object.keys(units)
  return z
    .strictObject({
      column: z.string().min(1).describe('Name of the column in the header line of the file.'),
      unit: z
        .enum(names as [string, ...string[]])
        .describe(`Unit of the column: ${names.join(', ')}.`),
    })
    .describe(`Column of the ${what}.`)
}

const filePath = z
  .string()
  .min(1)
  .describe('CSV file with a header line; relative to the scenario file that names it.')

function knotsOf({ key, meaning, bounds }: ProfileQuantity) {
  return z
    .array(
      z.strictObject({
        altitude_km: altitude('Altitude of the knot'),
        [key]: given(meaning, bounds),
      }),
    )
    .min(2)
    .max(MOST_ROWS)
    .optional()
}

function tableOf({ key, meaning, bounds }: ProfileQuantity) {
  const values = (item: z.ZodNumber) => z.array(item).min(2).max(MOST_ROWS)
  return z
    .strictObject({
      altitude_km: values(altitude('Altitude')).describe('Altitudes, km, increasing.'),
      [key]: values(given(meaning, bounds)).describe(
        `${meaning}, ${bounds.unit}, one per altitude.`,
      ),
    })
    .optional()
}

/** The four forms of a profile as keys of its section. */
function formsOf(profiled: ProfileQuantity) {
  const { meaning, knots, fileUnits } = profiled
  return {
    knots: knotsOf(profiled).describe(
      `${meaning} at altitudes, joined by a monotone cubic. Default ${JSON.stringify(knots.value)}: ${knots.reason}.`,
    ),
    table: tableOf(profiled).describe(`${meaning}: the same as two lists of equal length.`),
    file: z
      .strictObject({
        path: filePath,
        altitude: column('altitude', altitudeUnits),
        value: column('values', fileUnits),
      })
      .optional()
      .describe(`${meaning} from a CSV file with named columns.`),
    series: z
      .array(
        z.strictObject({
          time_h: given('Time from the start of the run', { unit: 'h', from: -1e5, to: 1e5 }),
          knots: knotsOf(profiled).describe('Knots at this time.'),
          table: tableOf(profiled).describe('Table at this time.'),
        }),
      )
      .min(1)
      .max(MOST_TIMES)
      .optional()
      .describe(
        `${meaning} that changes with time: linear between the times, constant outside them, equal altitudes throughout.`,
      ),
  }
}

const measured = z
  .strictObject({
    time_h: z.array(z.number()).min(1).max(MOST_TIMES).optional().describe('Times, h, increasing.'),
    altitude_km: z
      .array(altitude('Altitude'))
      .min(2)
      .max(MOST_ROWS)
      .optional()
      .describe('Altitudes, km, increasing.'),
    temperature_K: z
      .array(z.array(given('Temperature', { unit: 'K', above: 0, to: 1000 })))
      .optional()
      .describe('Temperatures, K: one list per time, one value per altitude.'),
    file: z
      .strictObject({
        path: filePath,
        time: column('time', timeUnits),
        altitude: column('altitude', altitudeUnits),
        temperature: column('temperature', { K: 1 }),
      })
      .optional()
      .describe('The same from a CSV file: one row per time and altitude, no gaps.'),
  })
  .optional()
  .describe(
    'Measured temperature against time and altitude. It replaces the temperature where it applies, at fixed altitude, and displaces no air. Default: none.',
  )

const factor = (fallback: { value: number; reason: string }, from = 0, to = 1000) =>
  quantity('Factor on the whole profile', { from, to }, fallback)

export const temperatureSection = section(
  'Temperature of the undisturbed air; pressure and density follow hydrostatically',
  {
    ...formsOf(profileQuantities.temperature),
    offset_K: quantity(
      'Added to the whole profile before pressure is computed (a perturbation, in contrast, acts at fixed density)',
      { unit: 'K', from: -200, to: 200 },
      temperatureDefaults.offset_K,
    ),
    rebase_every_h: quantity(
      'How often a temperature that changes over days is brought back to hydrostatic balance',
      { unit: 'h', from: 24, to: 1e5 },
      temperatureDefaults.rebase_every_h,
    ),
    measured,
  },
)

export const waterSection = section('Water vapour of the undisturbed air', {
  ...formsOf(profileQuantities.water),
  factor: factor(waterDefaults.factor),
  at_83km_ppmv: optionalNumber(
    'Scales the whole profile to this value at 83 km (at the first time of a series)',
    { unit: 'ppmv', above: 0, to: 1e5 },
    'Not together with a factor. Default none: the profile is taken as it stands',
  ),
})

export const windSection = section('Mean vertical wind', {
  ...formsOf(profileQuantities.wind),
  factor: factor(windDefaults.factor, -1000),
})

export const mixingSection = section('Eddy diffusion', {
  ...formsOf(profileQuantities.mixing),
  factor: factor(mixingDefaults.factor),
})

export const nucleiSection = section('Nuclei (meteoric smoke) on which ice can form', {
  ...formsOf(profileQuantities.nuclei),
  factor: factor(nucleusDefaults.factor),
  classes: z
    .array(
      z.strictObject({
        radius_nm: given('Radius of the nuclei', { unit: 'nm', above: 0, to: 100 }),
        share: given('Share of this class in the number of nuclei', { above: 0, to: 1e6 }),
      }),
    )
    .min(1)
    .max(20)
    .default(nucleusDefaults.classes.value)
    .describe(
      `Radius classes of the nuclei; the shares are divided by their sum. Default ${JSON.stringify(nucleusDefaults.classes.value)}: ${nucleusDefaults.classes.reason}.`,
    ),
})

export const photolysisSection = section('Loss of water vapour to sunlight', {
  ...formsOf(profileQuantities.photolysis),
  enabled: toggle('Whether sunlight destroys water vapour', photolysisDefaults.enabled),
})
