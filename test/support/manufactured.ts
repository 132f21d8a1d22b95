import {
  AIR_HEAT_CAPACITY,
  AIR_MOLECULE_MASS,
  BOLTZMANN,
  EARTH_RADIUS,
  STANDARD_GRAVITY,
} from '../../src/model/constants.ts'
import { fallSpeed } from '../../src/model/processes/fallSpeed.ts'
import { gravity } from '../../src/model/processes/gravity.ts'
import { growthRate } from '../../src/model/processes/growthRate.ts'
import { kelvinFactor } from '../../src/model/processes/kelvinFactor.ts'
import { saturationPressure } from '../../src/model/processes/saturationPressure.ts'
import { waterDiffusivity } from '../../src/model/processes/waterDiffusivity.ts'
import { MOLECULE_VOLUME } from './lagrangianBox.ts'

/**
 * A smooth solution of the column's equations, made up beforehand, and the sources that make it one:
 *   ice     N(z, xi, t) = F(z, xi) g(t) particles per volume and unit xi, r(xi) the radius classes
 *   vapour  q(z), steady
 * in isothermal air that a standing displacement zeta(z) stretches by 1 + Z, with all transport and growth on. The
 * equations are written here once more, apart from the model, from the laws of the processes. All numbers invented.
 */

export const REST_K = 143
export const REFERENCE = { altitude_m: 84e3, pressure_Pa: 0.6 }
export const WAVE = { amplitude_K: 3, wavelength_m: 9000, phase_rad: 0.7, at_m: 85e3 }
export const SIZES = { smallest_nm: 10, largest_nm: 90, stretching: 1.5 }
const DENSITY = 932

export const wind = (z: number) => 0.02 + 1e-6 * (z - 80e3)
export const mixing = (z: number) => 20 * Math.exp((z - 80e3) / 20e3)
export const mixingRatio = (z: number) => 3e-6 * (1 + 0.2 * Math.sin((z - 80e3) / 2500))

const PEAK_PER_M3 = 1e8
const PERIOD_S = 6 * 3600
/** Growth and decay of the ice, g, and dg/dt. */
export const course = (t: number) => 1 + 0.5 * Math.sin((2 * Math.PI * t) / PERIOD_S)
export const courseRate = (t: number) =>
  (Math.PI / PERIOD_S) * Math.cos((2 * Math.PI * t) / PERIOD_S)

/** F, 1/m3 per unit xi: a smooth hump in both directions that keeps clear of all ends of the axes. */
export function ice(z: number, xi: number): number {
  return PEAK_PER_M3 * hump((z - 84.5e3) / 8000) * hump((xi - 0.5) / 0.48)
}

/** cos^4 between -1 and 1, nothing outside. */
const hump = (x: number) => (Math.abs(x) < 1 ? Math.cos((Math.PI / 2) * x) ** 4 : 0)

const SPAN = ((SIZES.largest_nm - SIZES.smallest_nm) * 1e-9) / Math.expm1(SIZES.stretching)
const radiusAt = (xi: number) => SIZES.smallest_nm * 1e-9 + SPAN * Math.expm1(SIZES.stretching * xi)
const radiusSlope = (xi: number) => SPAN * SIZES.stretching * Math.exp(SIZES.stretching * xi)

function restingPressure(z: number): number {
  const perInverseRadius =
    (AIR_MOLECULE_MASS * STANDARD_GRAVITY * EARTH_RADIUS ** 2) / (BOLTZMANN * REST_K)
  const distance = 1 / (EARTH_RADIUS + z) - 1 / (EARTH_RADIUS + REFERENCE.altitude_m)
  return REFERENCE.pressure_Pa * Math.exp(perInverseRadius * distance)
}

export const airNumber = (z: number) => restingPressure(z) / (BOLTZMANN * REST_K)

function displacement(z: number): number {
  const phase = (2 * Math.PI * (z - WAVE.at_m)) / WAVE.wavelength_m - WAVE.phase_rad
  return (-WAVE.amplitude_K * Math.cos(phase) * AIR_HEAT_CAPACITY) / gravity(z)
}

/** Temperature and pressure of the displaced air, and its stretching. */
function parcel(z: number) {
  const shift = displacement(z)
  return {
    temperature_K: REST_K - (gravity(z) / AIR_HEAT_CAPACITY) * shift,
    pressure_Pa: restingPressure(z + shift),
    stretch: 1 + derivative(displacement, z, 5),
  }
}

function fall(z: number, xi: number): number {
  const { temperature_K, pressure_Pa } = parcel(z)
  const drag = { dragDelta: 1 + Math.PI / 8, slip: 'epsteinStokes' as const }
  return fallSpeed({
    radius_m: radiusAt(xi),
    temperature_K,
    pressure_Pa,
    gravity: gravity(z),
    density: DENSITY,
    ...drag,
  })
}

/** d xi/dt by growth. */
function growth(z: number, xi: number): number {
  const { temperature_K, pressure_Pa } = parcel(z)
  const r = radiusAt(xi)
  const rate = growthRate({
    accommodation: 0.83,
    density: DENSITY,
    temperature_K,
    vapourPressure_Pa: mixingRatio(z) * pressure_Pa,
    equilibriumPressure_Pa:
      saturationPressure('murphyKoop2005', temperature_K) * kelvinFactor(r, temperature_K, DENSITY),
  })
  return rate / radiusSlope(xi)
}

/** What transport and growth make of F, 1/(m3 s) per unit xi: the right-hand side of the ice for g = 1. */
export function iceTendency(z: number, xi: number): number {
  const q = (at: number) => ice(at, xi) / airNumber(at)
  const flux = (at: number) => {
    const { stretch } = parcel(at)
    const carried = (wind(at) - fall(at, xi) / stretch) * q(at)
    return airNumber(at) * (carried - (mixing(at) / stretch ** 2) * derivative(q, at, 10))
  }
  const massFlux = (at: number) => airNumber(at) * wind(at)
  const classFlux = (x: number) => growth(z, x) * ice(z, x)
  return (
    -derivative(flux, z, 10) + q(z) * derivative(massFlux, z, 10) - derivative(classFlux, xi, 1e-3)
  )
}

/** What transport makes of the vapour, 1/(m3 s). */
export function vapourTransport(z: number): number {
  const flux = (at: number) => {
    const { temperature_K, pressure_Pa, stretch } = parcel(at)
    const diffusivity = mixing(at) + waterDiffusivity(temperature_K, pressure_Pa)
    return (
      airNumber(at) *
      (wind(at) * mixingRatio(at) - (diffusivity / stretch ** 2) * derivative(mixingRatio, at, 10))
    )
  }
  const massFlux = (at: number) => airNumber(at) * wind(at)
  return -derivative(flux, z, 10) + mixingRatio(z) * derivative(massFlux, z, 10)
}

/** Vapour that F takes up, integral of F (d xi/dt) dm/d xi over xi, molecules/(m3 s). */
export function vapourUptake(z: number): number {
  const nodes = 200
  let sum = 0
  for (let i = 0; i < nodes; i++) {
    const xi = (i + 0.5) / nodes
    const perXi = (4 * Math.PI * radiusAt(xi) ** 2 * radiusSlope(xi)) / MOLECULE_VOLUME
    sum += ice(z, xi) * growth(z, xi) * perXi
  }
  return sum / nodes
}

/** Fourth-order central difference. */
function derivative(f: (x: number) => number, x: number, h: number): number {
  return (8 * (f(x + h) - f(x - h)) - (f(x + 2 * h) - f(x - 2 * h))) / (12 * h)
}
