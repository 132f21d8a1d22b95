/**
 * The air at one instant, on the half points of the grid (resting altitude). Arrays are reused from call to call.
 */
export interface AirState {
  /** Temperature of the displaced air with perturbations, K. */
  temperature_K: Float64Array
  /** Pressure at the displaced altitude, Pa. */
  pressure_Pa: Float64Array
  /** Displacement of the air from its resting altitude, m. */
  displacement_m: Float64Array
  /** Z = d(displacement)/dz0: layers of air are 1 + Z times as thick as at rest. */
  stretching: Float64Array
  /** n/n0: air density at the displaced place over that at rest; perturbations do not change it. */
  densityRatio: Float64Array
  /** Mean vertical wind, m/s. */
  wind_m_per_s: Float64Array
  /** Eddy diffusivity, m2/s. */
  mixing_m2_per_s: Float64Array
  /** Loss rate of water vapour by photolysis, 1/s. */
  photolysis_per_s: Float64Array
  /** Background mole fraction of water vapour, which the boundaries hold outside the column. */
  water: Float64Array
  /** Background mixing ratio of all nuclei together. */
  nuclei: Float64Array
  injection: InjectionRates
}

/** Slow injections by ramped perturbations of water and nuclei. */
export interface InjectionRates {
  active: boolean
  /** Added mole fraction per second. */
  waterAdded_per_s: Float64Array
  /** Relative growth of the vapour, 1/s. */
  waterGain_per_s: Float64Array
  nucleiAdded_per_s: Float64Array
  nucleiGain_per_s: Float64Array
}

export function makeAirState(points: number): AirState {
  const array = () => new Float64Array(points)
  return {
    temperature_K: array(),
    pressure_Pa: array(),
    displacement_m: array(),
    stretching: array(),
    densityRatio: array(),
    wind_m_per_s: array(),
    mixing_m2_per_s: array(),
    photolysis_per_s: array(),
    water: array(),
    nuclei: array(),
    injection: {
      active: false,
      waterAdded_per_s: array(),
      waterGain_per_s: array(),
      nucleiAdded_per_s: array(),
      nucleiGain_per_s: array(),
    },
  }
}
