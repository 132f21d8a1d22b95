/**
 * The profiled quantities: their keys, bounds and units.
 */
import {
  mixingDefaults,
  nucleusDefaults,
  photolysisDefaults,
  temperatureDefaults,
  waterDefaults,
  windDefaults,
} from './defaults.ts'

/** One profiled quantity: the key that carries its values, its bounds, and the units a file may state. */
export interface ProfileQuantity {
  key: string
  meaning: string
  bounds: { unit: string; above?: number; from?: number; to: number }
  /** Factor from the unit of a file to the unit of the key. */
  fileUnits: Record<string, number>
  /** Always positive and ranging over decades: interpolated in the logarithm. */
  logarithmic: boolean
  knots: { value: Record<string, number>[]; reason: string }
}

export const profileQuantities = {
  temperature: {
    key: 'temperature_K',
    meaning: 'Temperature of the undisturbed air',
    bounds: { unit: 'K', above: 0, to: 1000 },
    fileUnits: { K: 1 },
    logarithmic: false,
    knots: temperatureDefaults.knots,
  },
  water: {
    key: 'water_ppmv',
    meaning: 'Mixing ratio of water vapour',
    bounds: { unit: 'ppmv', above: 0, to: 1e5 },
    fileUnits: { ppmv: 1, 'mol/mol': 1e6 },
    logarithmic: true,
    knots: waterDefaults.knots,
  },
  wind: {
    key: 'wind_cm_per_s',
    meaning: 'Mean upward wind',
    bounds: { unit: 'cm/s', from: -1000, to: 1000 },
    fileUnits: { 'cm/s': 1, 'm/s': 100 },
    logarithmic: false,
    knots: windDefaults.knots,
  },
  mixing: {
    key: 'mixing_m2_per_s',
    meaning: 'Eddy diffusivity',
    bounds: { unit: 'm2/s', above: 0, to: 1e5 },
    fileUnits: { 'm2/s': 1 },
    logarithmic: true,
    knots: mixingDefaults.knots,
  },
  nuclei: {
    key: 'nuclei_per_cm3',
    meaning: 'Number density of all nuclei together',
    bounds: { unit: '1/cm3', above: 0, to: 1e7 },
    fileUnits: { '1/cm3': 1, '1/m3': 1e-6 },
    logarithmic: true,
    knots: nucleusDefaults.knots,
  },
  photolysis: {
    key: 'lifetime_d',
    meaning: 'Lifetime of water vapour against photolysis',
    bounds: { unit: 'd', above: 0, to: 1e6 },
    fileUnits: { d: 1, h: 1 / 24, s: 1 / 86400 },
    logarithmic: true,
    knots: photolysisDefaults.knots,
  },
} satisfies Record<string, ProfileQuantity>

export type ProfileName = keyof typeof profileQuantities

/** The ways to write a profile; exactly one is used. */
export const profileForms = ['knots', 'table', 'file', 'series'] as const

/** Factor from the unit of a file to km. */
export const altitudeUnits: Record<string, number> = { km: 1, m: 1e-3 }
/** Factor from the unit of a file to h. */
export const timeUnits: Record<string, number> = { h: 1, min: 1 / 60, s: 1 / 3600, d: 24 }
