/**
 * What disturbs the column: waves, random waves, perturbations.
 */
import { z } from 'zod'
import {
  altitude,
  choice,
  given,
  optionalNumber,
  quantity,
  section,
  span,
  toggle,
  wholeNumber,
} from './fields.ts'
import { randomWaveDefaults, waveDefaults } from './modelDefaults.ts'

const LONGEST_HOURS = 1e5

/** Keys that a single wave and a random field share. */
const waveBehaviour = {
  at_km: quantity(
    'Reference altitude, where the amplitude is as given',
    { unit: 'km', from: 0, to: 150 },
    waveDefaults.at_km,
  ),
  start_h: quantity(
    'Start, from the start of the run',
    { unit: 'h', from: -LONGEST_HOURS, to: LONGEST_HOURS },
    waveDefaults.start_h,
  ),
  end_h: optionalNumber(
    'End, from the start of the run',
    { unit: 'h', from: -LONGEST_HOURS, to: LONGEST_HOURS },
    'Default none: it goes on',
  ),
  rise_h: quantity(
    'Time of the smooth rise after the start and of the fall before the end',
    { unit: 'h', from: 0, to: LONGEST_HOURS },
    waveDefaults.rise_h,
  ),
  displacement_share: quantity(
    'Share of the temperature change that is adiabatic displacement of air: 1 for gravity waves, less for tides and planetary waves, 0 for none',
    { from: 0, to: 1 },
    waveDefaults.displacement_share,
  ),
  grows: toggle(
    'Whether the amplitude grows upward as exp(z/2H) from the reference altitude',
    waveDefaults.grows,
  ),
}

const period = { unit: 'h', above: 0, to: LONGEST_HOURS }
const wavelength = { unit: 'km', above: 0, to: 1e4 }

export const wavesList = z
  .array(
    z.strictObject({
      amplitude_K: given('Temperature amplitude at the reference altitude', {
        unit: 'K',
        from: 0,
        to: 100,
      }),
      period_h: given('Period', period),
      vertical_wavelength_km: given('Vertical wavelength; the phase moves down', wavelength),
      phase_deg: quantity(
        'Phase: the temperature crest passes the reference altitude this much later in the period',
        { unit: 'degrees', from: -360, to: 360 },
        waveDefaults.phase_deg,
      ),
      ...waveBehaviour,
    }),
  )
  .max(500)
  .default([])
  .describe(
    'Waves that displace the column: gravity waves, tides, two- and five-day waves alike. Default none: the night is quiet.',
  )

export const randomWaves = z
  .strictObject({
    seed: wholeNumber(
      'Seed of the random numbers',
      { from: 0, to: 2 ** 32 - 1 },
      randomWaveDefaults.seed,
    ),
    count: wholeNumber('Number of waves', { from: 1, to: 500 }, randomWaveDefaults.count),
    rms_K: quantity(
      'Root mean square of the temperature change of all waves together at the reference altitude',
      { unit: 'K', from: 0, to: 100 },
      randomWaveDefaults.rms_K,
    ),
    periods_h: span(
      'Shortest and longest period, drawn evenly in the logarithm',
      period,
      randomWaveDefaults.periods_h,
    ),
    vertical_wavelengths_km: span(
      'Shortest and longest vertical wavelength, drawn evenly in the logarithm',
      wavelength,
      randomWaveDefaults.vertical_wavelengths_km,
    ),
    spectral_slope: quantity(
      'Slope p of the spectrum: variance per vertical wavenumber m falls as m to the power -p',
      { from: -10, to: 10 },
      randomWaveDefaults.spectral_slope,
    ),
    ...waveBehaviour,
  })
  .optional()
  .describe(
    'A random superposition of waves, spelt out from the seed; it comes on top of `waves`. Default none: the night is quiet.',
  )

const bandEdge = (meaning: string) => altitude(meaning).optional()

const perturbationAltitude = z
  .strictObject({
    from_km: bandEdge('Lower edge of a band with sharp edges'),
    to_km: bandEdge('Upper edge of a band with sharp edges'),
    centre_km: bandEdge('Centre of a Gaussian band'),
    width_km: optionalNumber(
      'Full width of a Gaussian band at half maximum',
      { unit: 'km', above: 0, to: 100 },
      'With centre_km',
    ),
  })
  .optional()
  .describe('Where it acts: from_km and to_km, or centre_km and width_km. Default: everywhere.')

const hour = (meaning: string, when: string) =>
  optionalNumber(meaning, { unit: 'h', from: -LONGEST_HOURS, to: LONGEST_HOURS }, when)

const perturbationTime = section('When it acts', {
  shape: choice(
    'Course in time: always; step (from start_h on); pulse (between start_h and end_h); ramp (rises over rise_h after start_h, falls over rise_h before end_h)',
    ['always', 'step', 'pulse', 'ramp'],
    { value: 'always', reason: 'the simplest course' },
  ),
  start_h: hour('Start, from the start of the run', 'For step, pulse and ramp'),
  end_h: hour('End, from the start of the run', 'For pulse, and for a ramp that ends'),
  rise_h: optionalNumber(
    'Time of rise and of fall',
    { unit: 'h', above: 0, to: LONGEST_HOURS },
    'For ramp',
  ),
})

const added = (what: string, unit: string, limit: number) =>
  optionalNumber(
    `Amount added to the ${what}`,
    { unit, from: -limit, to: limit },
    'In place of a factor',
  )

/** The key that adds an amount to each quantity. */
export const amountKeys = {
  temperature: 'add_K',
  water: 'add_ppmv',
  wind: 'add_cm_per_s',
  mixing: 'add_m2_per_s',
  nuclei: 'add_per_cm3',
} as const

export const perturbationsList = z
  .array(
    z.strictObject({
      quantity: z
        .enum(['temperature', 'water', 'wind', 'mixing', 'nuclei'])
        .describe('What is changed: temperature, water, wind, mixing or nuclei.'),
      add_K: added('temperature', 'K', 500),
      add_ppmv: added('background water', 'ppmv', 1e5),
      add_cm_per_s: added('wind', 'cm/s', 1e4),
      add_m2_per_s: added('eddy diffusivity', 'm2/s', 1e5),
      add_per_cm3: added('number of nuclei', '1/cm3', 1e7),
      factor: optionalNumber(
        'Factor on the quantity',
        { from: -1000, to: 1000 },
        'In place of an added amount',
      ),
      altitude: perturbationAltitude,
      time: perturbationTime,
    }),
  )
  .max(500)
  .default([])
  .describe(
    'Changes in an altitude band and a time window, at fixed air density and pressure. Default none: the night is quiet.',
  )
