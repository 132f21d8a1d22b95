/**
 * A scenario after `resolve`: complete, checked, in SI units. This is all the model ever sees of a scenario file.
 * Times are seconds from the start of the run, altitudes metres above sea level.
 */

/** A quantity against altitude and, where it has more than one time, time. Linear in time, constant outside. */
export interface Profile {
  altitudes_m: number[]
  /** At least one; strictly increasing. */
  times_s: number[]
  /** values[time][altitude] */
  values: number[][]
  /** Interpolated in the logarithm of the value (always positive quantities over decades) or in the value itself. */
  logarithmic: boolean
}

export interface GridSpec {
  bottom_m: number
  top_m: number
  levels: number
}

/** Radius classes: edges r_min + (r_max - r_min)(e^(b xi) - 1)/(e^b - 1) at xi = 0, 1/K, ..., 1. */
export interface SizeSpec {
  smallest_m: number
  largest_m: number
  classes: number
  stretching: number
}

export interface NucleusClass {
  radius_m: number
  /** Share of the total number of nuclei; shares add up to one. */
  share: number
}

export interface BackgroundSpec {
  referenceAltitude_m: number
  referencePressure_Pa: number
  temperature_K: Profile
  /** Mole fraction of water vapour. */
  water: Profile
  wind_m_per_s: Profile
  mixing_m2_per_s: Profile
  /** Total number density of nuclei in the air at rest, 1/m3. */
  nuclei_per_m3: Profile
  nucleusClasses: NucleusClass[]
  /** Lifetime of water vapour against photolysis, s; null when switched off. */
  photolysisLifetime_s: Profile | null
  /** Measured T(z, t) that replaces T where it applies, at fixed altitude; null without one. */
  temperatureTable_K: Profile | null
  /** How often a background that changes with time is brought back to hydrostatic balance, s. */
  rebaseInterval_s: number
}

export interface Wave {
  amplitude_K: number
  referenceAltitude_m: number
  period_s: number
  verticalWavelength_m: number
  /** T' = A cos(2 pi t/period + 2 pi (z - z_ref)/wavelength - phase). Phase moves down, energy up. */
  phase_rad: number
  /** Smooth start and end; the wave is full between start + rise and end - rise. Infinity when it never ends. */
  start_s: number
  end_s: number
  rise_s: number
  /** Share s of T' that is adiabatic displacement. */
  displacementShare: number
  /** Whether the amplitude grows as exp(z/2H) away from the reference altitude. */
  grows: boolean
  /** Whether it is a member of the random superposition, whose phases are independent. */
  isRandomMember: boolean
}

export type PerturbedQuantity = 'temperature' | 'water' | 'wind' | 'mixing' | 'nuclei'

export type AltitudeShape =
  | { shape: 'everywhere' }
  | { shape: 'topHat'; from_m: number; to_m: number }
  | { shape: 'gaussian'; centre_m: number; sigma_m: number }

/**
 * always: the whole run. step: from start on. pulse: between start and end. ramp: rises linearly from start over
 * rise, holds, and falls linearly over rise before end (end may be Infinity).
 */
export type TimeShape =
  | { shape: 'always' }
  | { shape: 'step'; start_s: number }
  | { shape: 'pulse'; start_s: number; end_s: number }
  | { shape: 'ramp'; start_s: number; end_s: number; rise_s: number }

/** Acts at fixed air density and pressure. 'add' in K, mole fraction, m/s, m2/s or 1/m3; 'multiply' by a factor. */
export interface Perturbation {
  quantity: PerturbedQuantity
  mode: 'add' | 'multiply'
  amount: number
  altitude: AltitudeShape
  time: TimeShape
}

/** A layer of ice to start from: Gaussian in altitude, log-normal in radius. */
export interface InitialIce {
  altitude_m: number
  /** Standard deviation in altitude, m. */
  sigma_m: number
  /** Peak number density, 1/m3. */
  number_per_m3: number
  medianRadius_m: number
  /** Geometric standard deviation of the radius (above 1). */
  geometricWidth: number
}

export type SaturationFormula = 'murphyKoop2005' | 'iapws2011' | 'martiMauersberger1993'
export type AmorphousOffset = 'none' | 'nucleation' | 'growth' | 'both'

export interface IceSpec {
  /** kg/m3 */
  density: number
  accommodation: number
  saturation: SaturationFormula
  amorphousOffset: AmorphousOffset
  /** Steady excess of the particle temperature over the air, K. */
  particleWarming_K: number
  /** Epstein's delta: 1 specular, 1 + pi/8 diffuse. */
  dragDelta: number
  slip: 'epsteinStokes' | 'davies'
}

export interface NucleationSpec {
  scheme: 'classical' | 'activation' | 'off'
  contactParameter: number
  desorptionEnergy_J: number
  surfaceDiffusionEnergy_J: number
  vibrationFrequency_per_s: number
  jumpDistance_m: number
}

export interface ProcessSwitches {
  growth: boolean
  sedimentation: boolean
  diffusion: boolean
  wind: boolean
  /** Shuts top, bottom and sides: nothing enters or leaves. */
  closed: boolean
}

export interface NumericsSpec {
  relativeTolerance: number
  /** 1/m3, for ice of 10 nm and below; falls as (10 nm/r)^6. */
  absoluteToleranceIce: number
  /** 1/m3 */
  absoluteToleranceVapour: number
  /** Fastest complete passage of one class by sublimation, s. */
  sublimationCeiling_s: number
  /** Shortest nucleation time, s. */
  nucleationCeiling_s: number
  maxStepsPerInterval: number
  extrapolationColumns: number
  /** Instants to be met exactly beside those that the scenario itself has. */
  breakPoints_s: number[]
}

export type ChannelGeometry =
  | { kind: 'albedo'; scatteringAngle_rad: number; viewZenith_rad: number }
  | { kind: 'backscatter' }

export interface Channel {
  /** Lower-case words and digits; names columns: backscatter_<name>_per_m_sr. */
  name: string
  wavelength_m: number
  /** Complex refractive index n + ik of ice at the wavelength. */
  refractiveIndex: { n: number; k: number }
  geometry: ChannelGeometry
}

export interface Scenario {
  title: string
  duration_s: number
  outputInterval_s: number
  /** ISO 8601, or null: labels only, no effect on the physics. */
  startUtc: string | null
  grid: GridSpec
  sizes: SizeSpec
  background: BackgroundSpec
  /** Named waves and the members of the random superposition, one list. */
  waves: Wave[]
  perturbations: Perturbation[]
  initialIce: InitialIce[]
  ice: IceSpec
  nucleation: NucleationSpec
  processes: ProcessSwitches
  numerics: NumericsSpec
  channels: Channel[]
}
