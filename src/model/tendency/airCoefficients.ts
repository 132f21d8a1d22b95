/**
 * Everything the fast right-hand side needs of the air, worked out once per level and face: once per interval in
 * steady air, once per instant under waves. It keeps temperature-dependent work out of the loops over the state.
 */
import type { AirState } from '../atmosphere/airState.ts'
import type { AirBasis } from '../atmosphere/atmosphere.ts'
import { BOLTZMANN } from '../constants.ts'
import { centrePoint, facePoint } from '../grid.ts'
import { amorphousPressureFactor } from '../processes/amorphousPressureFactor.ts'
import { impingementRate } from '../processes/impingementRate.ts'
import { kelvinRadius } from '../processes/kelvinRadius.ts'
import { moleculeVolume } from '../processes/moleculeVolume.ts'
import { saturationPressure } from '../processes/saturationPressure.ts'
import { surfaceEnergy } from '../processes/surfaceEnergy.ts'
import { waterDiffusivity } from '../processes/waterDiffusivity.ts'
import type { Column } from '../state/column.ts'
import {
  type IceCoefficients,
  makeIceCoefficients,
  readLosses,
  readSpeeds,
} from './iceCoefficients.ts'
import type { KelvinTable } from './kernel/kelvinTable.ts'

export interface AirCoefficients {
  level: LevelCoefficients
  face: FaceCoefficients
  ice: IceCoefficients
  /** Mixing ratios that hold half a cell outside. */
  outside: { waterBelow: number; waterAbove: number; nucleiBelow: number; nucleiAbove: number }
  injection: AirState['injection']
}

/** One value per cell. */
export interface LevelCoefficients {
  /** n0, 1/m3, and its inverse. */
  density: Float64Array
  inverseDensity: Float64Array
  temperature: Float64Array
  /** Vapour pressure per vapour number density, p/n0, Pa m3. */
  pressurePerDensity: Float64Array
  /** Growth rate per excess pressure, alpha v_m/sqrt(2 pi m k T), m/(s Pa). */
  growth: Float64Array
  /** Pressure over a flat surface of the growing particle, Pa. */
  growthPressure: Float64Array
  /** Kelvin radius at the temperature of the particle, m. */
  kelvinRadius: Float64Array
  /** Pressure over a flat surface of the phase that nucleates, Pa. */
  nucleationPressure: Float64Array
  /** Kelvin radius at the temperature of the air, m. */
  germ: Float64Array
  /** Barrier of a whole germ over kT and its radius squared, 4 pi sigma/(3 k T), 1/m2. */
  barrier: Float64Array
  /** 1/s */
  photolysis: Float64Array
  /** Convergence of the mean wind, d(n0 w)/dz, 1/(m3 s). */
  lateral: Float64Array
}

/** One value per face, closed boundaries included as zeros. */
export interface FaceCoefficients {
  /** n0 w, 1/(m2 s). */
  wind: Float64Array
  /** n0 K/(dz (1 + Z)^2), 1/(m2 s). */
  eddy: Float64Array
  /** n0 (K + D)/(dz (1 + Z)^2), 1/(m2 s). */
  vapour: Float64Array
}

export function makeAirCoefficients(column: Column): AirCoefficients {
  const { grid } = column
  const perLevel = () => new Float64Array(grid.levels)
  const perFace = () => new Float64Array(grid.levels + 1)
  return {
    level: {
      density: perLevel(),
      inverseDensity: perLevel(),
      temperature: perLevel(),
      pressurePerDensity: perLevel(),
      growth: perLevel(),
      growthPressure: perLevel(),
      kelvinRadius: perLevel(),
      nucleationPressure: perLevel(),
      germ: perLevel(),
      barrier: perLevel(),
      photolysis: perLevel(),
      lateral: perLevel(),
    },
    face: {
      wind: perFace(),
      eddy: perFace(),
      vapour: perFace(),
    },
    ice: makeIceCoefficients(column),
    outside: { waterBelow: 0, waterAbove: 0, nucleiBelow: 0, nucleiAbove: 0 },
    injection: {
      active: false,
      waterAdded_per_s: new Float64Array(0),
      waterGain_per_s: new Float64Array(0),
      nucleiAdded_per_s: new Float64Array(0),
      nucleiGain_per_s: new Float64Array(0),
    },
  }
}

export function readAirCoefficients(
  into: AirCoefficients,
  column: Column,
  kelvin: KelvinTable,
  { basis, air }: { basis: AirBasis; air: AirState },
): void {
  readFaces(into.face, column, basis, air)
  readLevels(into, column, basis, air)
  readSpeeds(into.ice.speed, into.face, column, { basis, air })
  readLosses(into.ice.loss, into.level, kelvin)
  const top = air.water.length - 1
  into.outside.waterBelow = air.water[0]
  into.outside.waterAbove = air.water[top]
  into.outside.nucleiBelow = air.nuclei[0]
  into.outside.nucleiAbove = air.nuclei[top]
  into.injection = air.injection
}

function readFaces(face: FaceCoefficients, column: Column, basis: AirBasis, air: AirState): void {
  const { scenario, grid } = column
  const { wind, diffusion, closed } = scenario.processes
  for (let f = 0; f <= grid.levels; f++) {
    const point = facePoint(f)
    const shut = closed && (f === 0 || f === grid.levels)
    const temperature_K = air.temperature_K[point]
    const pressure_Pa = air.pressure_Pa[point]
    const resting = shut ? 0 : basis.rest.density_per_m3[point]
    const stretch = 1 / (1 + air.stretching[point])
    const exchange = diffusion ? (resting * stretch * stretch) / grid.spacing_m : 0
    const eddy = air.mixing_m2_per_s[point]
    face.wind[f] = wind ? resting * air.wind_m_per_s[point] : 0
    face.eddy[f] = exchange * eddy
    face.vapour[f] = exchange * (eddy + waterDiffusivity(temperature_K, pressure_Pa))
  }
}

function readLevels(into: AirCoefficients, column: Column, basis: AirBasis, air: AirState): void {
  const { level, face } = into
  const { ice } = column.scenario
  const volume = moleculeVolume(ice.density)
  const growthPhase = ice.amorphousOffset === 'growth' || ice.amorphousOffset === 'both'
  const nucleationPhase = ice.amorphousOffset === 'nucleation' || ice.amorphousOffset === 'both'
  for (let i = 0; i < column.grid.levels; i++) {
    const point = centrePoint(i)
    const T = air.temperature_K[point]
    const particle = T + ice.particleWarming_K
    const n0 = basis.rest.density_per_m3[point]
    const saturated = saturationPressure(ice.saturation, T)
    const overParticle =
      ice.particleWarming_K === 0 ? saturated : saturationPressure(ice.saturation, particle)
    level.density[i] = n0
    level.inverseDensity[i] = 1 / n0
    level.temperature[i] = T
    level.pressurePerDensity[i] = air.pressure_Pa[point] / n0
    level.growth[i] = ice.accommodation * volume * impingementRate(1, T)
    level.growthPressure[i] = overParticle * (growthPhase ? amorphousPressureFactor(particle) : 1)
    level.kelvinRadius[i] = kelvinRadius(particle, ice.density)
    level.nucleationPressure[i] = saturated * (nucleationPhase ? amorphousPressureFactor(T) : 1)
    level.germ[i] = kelvinRadius(T, ice.density)
    level.barrier[i] = (4 * Math.PI * surfaceEnergy(T)) / (3 * BOLTZMANN * T)
    level.photolysis[i] = column.scenario.processes.closed ? 0 : air.photolysis_per_s[point]
    level.lateral[i] = column.scenario.processes.closed
      ? 0
      : (face.wind[i + 1] - face.wind[i]) / column.grid.spacing_m
  }
}
