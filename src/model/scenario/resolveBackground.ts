import { monotoneCubic } from '../numerics/monotoneCubic.ts'
import { DAY, HOUR, KILOMETRE, NANOMETRE, PER_CUBIC_CENTIMETRE, PPMV } from '../units.ts'
import { profileColumns } from './profileColumns.ts'
import { type ProfileName, profileQuantities } from './profileQuantities.ts'
import type { ScenarioDocument } from './schema.ts'
import type { BackgroundSpec, NucleusClass, Profile } from './types.ts'

const CENTIMETRE = 1e-2

/** The altitude of the handle `water.at_83km_ppmv`. */
const WATER_HANDLE_KM = 83

export function resolveBackground(document: ScenarioDocument): BackgroundSpec {
  const { pressure, temperature, wind, mixing, nuclei, photolysis, processes } = document
  const withoutPhotolysis = processes.closed || !photolysis.enabled
  const scaled = (name: ProfileName, factor: number) =>
    profileOf(document, name, (value) => value * factor)
  return {
    referenceAltitude_m: pressure.altitude_km * KILOMETRE,
    referencePressure_Pa: pressure.pressure_Pa,
    temperature_K: profileOf(document, 'temperature', (value) => value + temperature.offset_K),
    water: scaled('water', waterFactor(document) * PPMV),
    wind_m_per_s: scaled('wind', wind.factor * CENTIMETRE),
    mixing_m2_per_s: scaled('mixing', mixing.factor),
    nuclei_per_m3: scaled('nuclei', nuclei.factor * PER_CUBIC_CENTIMETRE),
    nucleusClasses: nucleusClasses(nuclei.classes),
    photolysisLifetime_s: withoutPhotolysis ? null : scaled('photolysis', DAY),
    temperatureTable_K: measuredTable(temperature.measured),
    rebaseInterval_s: temperature.rebase_every_h * HOUR,
  }
}

function profileOf(
  document: ScenarioDocument,
  name: ProfileName,
  convert: (value: number) => number,
): Profile {
  const columns = profileColumns(document, name)
  const values = columns.map((column) => column.values.map(convert))
  return {
    altitudes_m: columns[0].altitudes_km.map((altitude) => altitude * KILOMETRE),
    times_s: columns.map(({ time_h }) => time_h * HOUR),
    values,
    // A factor of zero empties a profile, and zero has no logarithm.
    logarithmic:
      profileQuantities[name].logarithmic && values.every((row) => row.every((value) => value > 0)),
  }
}

/** The plain factor, or the one that brings the profile to the wanted value at 83 km at its first time. */
function waterFactor(document: ScenarioDocument): number {
  const { at_83km_ppmv, factor } = document.water
  if (at_83km_ppmv === undefined) return factor
  const { altitudes_km, values } = profileColumns(document, 'water')[0]
  return (
    at_83km_ppmv /
    Math.exp(monotoneCubic(altitudes_km, values.map(Math.log)).value(WATER_HANDLE_KM))
  )
}

function nucleusClasses(classes: ScenarioDocument['nuclei']['classes']): NucleusClass[] {
  const total = classes.reduce((sum, { share }) => sum + share, 0)
  return classes.map(({ radius_nm, share }) => ({
    radius_m: radius_nm * NANOMETRE,
    share: share / total,
  }))
}

function measuredTable(measured: ScenarioDocument['temperature']['measured']): Profile | null {
  if (measured === undefined) return null
  const { time_h = [], altitude_km = [], temperature_K = [] } = measured
  return {
    altitudes_m: altitude_km.map((altitude) => altitude * KILOMETRE),
    times_s: time_h.map((time) => time * HOUR),
    values: temperature_K.map((row) => [...row]),
    logarithmic: false,
  }
}
