import { DEGREE, HOUR, KILOMETRE, PER_CUBIC_CENTIMETRE, PPMV } from '../units.ts'
import { amountKeys } from './forcingSchema.ts'
import { HALF_MAXIMUM_WIDTH } from './halfMaximumWidth.ts'
import { randomWaves } from './randomWaves.ts'
import type { ScenarioDocument } from './schema.ts'
import type { AltitudeShape, Perturbation, TimeShape, Wave } from './types.ts'

type WaveDocument = ScenarioDocument['waves'][number]
type PerturbationDocument = ScenarioDocument['perturbations'][number]

/** The named waves and, after them, the members of the random superposition. */
export function resolveWaves({ waves, random_waves }: ScenarioDocument): Wave[] {
  const members = random_waves === undefined ? [] : randomWaves(random_waves)
  return [
    ...waves.map((wave) => resolveWave(wave, false)),
    ...members.map((wave) => resolveWave(wave, true)),
  ]
}

function resolveWave(wave: WaveDocument, isRandomMember: boolean): Wave {
  return {
    amplitude_K: wave.amplitude_K,
    referenceAltitude_m: wave.at_km * KILOMETRE,
    period_s: wave.period_h * HOUR,
    verticalWavelength_m: wave.vertical_wavelength_km * KILOMETRE,
    phase_rad: wave.phase_deg * DEGREE,
    start_s: wave.start_h * HOUR,
    end_s: (wave.end_h ?? Infinity) * HOUR,
    rise_s: wave.rise_h * HOUR,
    displacementShare: wave.displacement_share,
    grows: wave.grows,
    isRandomMember,
  }
}

/** Factor from the unit of an added amount to SI. */
const amountUnits: Record<PerturbationDocument['quantity'], number> = {
  temperature: 1,
  water: PPMV,
  wind: 1e-2,
  mixing: 1,
  nuclei: PER_CUBIC_CENTIMETRE,
}

export function resolvePerturbation(change: PerturbationDocument): Perturbation {
  const { quantity, factor } = change
  const amount = change[amountKeys[quantity]] ?? 0
  return {
    quantity,
    mode: factor === undefined ? 'add' : 'multiply',
    amount: factor ?? amount * amountUnits[quantity],
    altitude: altitudeShape(change.altitude ?? {}),
    time: timeShape(change.time),
  }
}

function altitudeShape(band: NonNullable<PerturbationDocument['altitude']>): AltitudeShape {
  const { from_km, to_km, centre_km, width_km } = band
  if (from_km !== undefined && to_km !== undefined) {
    return { shape: 'topHat', from_m: from_km * KILOMETRE, to_m: to_km * KILOMETRE }
  }
  if (centre_km !== undefined && width_km !== undefined) {
    return {
      shape: 'gaussian',
      centre_m: centre_km * KILOMETRE,
      sigma_m: (width_km * KILOMETRE) / HALF_MAXIMUM_WIDTH,
    }
  }
  return { shape: 'everywhere' }
}

function timeShape(time: PerturbationDocument['time']): TimeShape {
  const start_s = (time.start_h ?? 0) * HOUR
  const end_s = (time.end_h ?? Infinity) * HOUR
  switch (time.shape) {
    case 'always':
      return { shape: 'always' }
    case 'step':
      return { shape: 'step', start_s }
    case 'pulse':
      return { shape: 'pulse', start_s, end_s }
    case 'ramp':
      return { shape: 'ramp', start_s, end_s, rise_s: (time.rise_h ?? 0) * HOUR }
  }
}
