/**
 * Everything the fast right-hand side needs of the air, worked out once per level and face: once per interval in
 * steady air, once per evaluation under waves. It keeps temperature-dependent work out of the loops over classes.
 */
import type { AirState } from '../atmosphere/airState.ts'
import type { AirBasis } from '../atmosphere/atmosphere.ts'
import { BOLTZMANN } from '../constants.ts'
import { centrePoint, facePoint } from '../grid.ts'
import { amorphousPressureFactor } from '../processes/amorphousPressureFactor.ts'
import { fallSpeedSeries } from '../processes/fallSpeedSeries.ts'
import { impingementRate } from '../processes/impingementRate.ts'
import { kelvinRadius } from '../processes/kelvinRadius.ts'
import { moleculeVolume } from '../processes/moleculeVolume.ts'
import { saturationPressure } from '../processes/saturationPressure.ts'
import { surfaceEnergy } from '../processes/surfaceEnergy.ts'
import { waterDiffusivity } from '../processes/waterDiffusivity.ts'
import type { Column } from '../state/column.ts'

export interface AirCoefficients {
  level: LevelCoefficients
  face: FaceCoefficients
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
  /** Impingement rate per pressure, 1/(m2 s Pa). */
  impingement: Float64Array
  /** exp(F_des/kT)/nu, s. */
  adsorption: Float64Array
  /** nu d exp(-F_sd/kT), m/s. */
  surfaceJumps: Float64Array
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
  /** n0/(1 + Z) times the series of the fall speed: n0 v(r)/(1 + Z) = fall1 r + fall2 r^2 + fall3 r^3. */
  fall1: Float64Array
  fall2: Float64Array
  fall3: Float64Array
  /** n0 K/(dz (1 + Z)^2), 1/(m2 s). */
  eddy: Float64Array
  /** n0 (K + D)/(dz (1 + Z)^2), 1/(m2 s). */
  vapour: Float64Array
}

export function makeAirCoefficients({ grid }: Column): AirCoefficients {
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
      impingement: perLevel(),
      adsorption: perLevel(),
      surfaceJumps: perLevel(),
      barrier: perLevel(),
      photolysis: perLevel(),
      lateral: perLevel(),
    },
    face: {
      wind: perFace(),
      fall1: perFace(),
      fall2: perFace(),
      fall3: perFace(),
      eddy: perFace(),
      vapour: perFace(),
    },
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
  basis: AirBasis,
  air: AirState,
): void {
  readFaces(into.face, column, basis, air)
  readLevels(into, column, basis, air)
  const top = air.water.length - 1
  into.outside.waterBelow = air.water[0]
  into.outside.waterAbove = air.water[top]
  into.outside.nucleiBelow = air.nuclei[0]
  into.outside.nucleiAbove = air.nuclei[top]
  into.injection = air.injection
}

function readFaces(face: FaceCoefficients, column: Column, basis: AirBasis, air: AirState): void {
  const { scenario, grid } = column
  const { wind, diffusion, sedimentation, closed } = scenario.processes
  const { density, dragDelta, slip } = scenario.ice
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
    if (!sedimentation) continue
    const gravity = basis.rest.gravity_m_per_s2[point]
    const fall = fallSpeedSeries({ temperature_K, pressure_Pa, gravity, density, dragDelta, slip })
    face.fall1[f] = resting * stretch * fall.linear
    face.fall2[f] = resting * stretch * fall.quadratic
    face.fall3[f] = resting * stretch * fall.cubic
  }
}

function readLevels(into: AirCoefficients, column: Column, basis: AirBasis, air: AirState): void {
  const { level, face } = into
  const { ice, nucleation } = column.scenario
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
    level.impingement[i] = impingementRate(1, T)
    level.growth[i] = ice.accommodation * volume * level.impingement[i]
    level.growthPressure[i] = overParticle * (growthPhase ? amorphousPressureFactor(particle) : 1)
    level.kelvinRadius[i] = kelvinRadius(particle, ice.density)
    level.nucleationPressure[i] = saturated * (nucleationPhase ? amorphousPressureFactor(T) : 1)
    level.germ[i] = kelvinRadius(T, ice.density)
    level.adsorption[i] =
      Math.exp(nucleation.desorptionEnergy_J / (BOLTZMANN * T)) /
      nucleation.vibrationFrequency_per_s
    level.surfaceJumps[i] =
      nucleation.vibrationFrequency_per_s *
      nucleation.jumpDistance_m *
      Math.exp(-nucleation.surfaceDiffusionEnergy_J / (BOLTZMANN * T))
    level.barrier[i] = (4 * Math.PI * surfaceEnergy(T)) / (3 * BOLTZMANN * T)
    level.photolysis[i] = column.scenario.processes.closed ? 0 : air.photolysis_per_s[point]
    level.lateral[i] = column.scenario.processes.closed
      ? 0
      : (face.wind[i + 1] - face.wind[i]) / column.grid.spacing_m
  }
}
