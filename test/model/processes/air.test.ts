import { describe, expect, it } from 'vitest'
import { airDensity } from '../../../src/model/processes/airDensity.ts'
import { coagulationTime } from '../../../src/model/processes/coagulationTime.ts'
import { collisionKernel } from '../../../src/model/processes/collisionKernel.ts'
import { gravity } from '../../../src/model/processes/gravity.ts'
import { meanMolecularSpeed } from '../../../src/model/processes/meanMolecularSpeed.ts'
import { waterDiffusivity } from '../../../src/model/processes/waterDiffusivity.ts'

describe('gravity', () => {
  it('is the standard value at sea level and falls with the square of the distance', () => {
    expect(gravity(0)).toBe(9.80665)
    expect(gravity(6356766)).toBeCloseTo(9.80665 / 4, 12)
  })

  it('is 9.55 m/s2 near 85 km', () => {
    // 9.80665 x (6356.766/6441.766)^2 = 9.54956, computed by hand from U.S. Standard Atmosphere 1976.
    expect(Math.abs(gravity(85e3) - 9.54956)).toBeLessThan(1e-5)
  })
})

describe('air as an ideal gas', () => {
  it('has density and molecular speed as computed independently', () => {
    // 150 K, 0.8 Pa and 155 K, 0.775885 Pa; seven digits kept.
    expect(airDensity(150, 0.8) / 1.857929e-5).toBeCloseTo(1, 6)
    expect(airDensity(155, 0.775885) / 1.743797e-5).toBeCloseTo(1, 6)
    expect(meanMolecularSpeed(150) / 331.1315).toBeCloseTo(1, 6)
    expect(meanMolecularSpeed(155) / 336.6051).toBeCloseTo(1, 6)
  })

  it('has the density of U.S. Standard Atmosphere 1976 at 80 km', () => {
    // Table I: 198.639 K, 1.0524e-2 mb, 1.8458e-5 kg/m3, read in public copies; five digits printed.
    expect(Math.abs(airDensity(198.639, 1.0524) / 1.8458e-5 - 1)).toBeLessThan(1e-4)
  })
})

describe('diffusion of water vapour', () => {
  it('is 2.2e-5 m2/s at the melting point and one atmosphere, and scales as T^1.81/p', () => {
    // From memory.
    expect(waterDiffusivity(273.15, 101325)).toBeCloseTo(2.2e-5, 12)
    const ratio = waterDiffusivity(136.575, 0.5) / waterDiffusivity(273.15, 1)
    expect(ratio).toBeCloseTo(2 / 2 ** 1.81, 12)
  })
})

describe('coagulation', () => {
  const ice = { radius_m: 50e-9, density: 932 }

  it('takes 50 days to halve 100 ice particles of 50 nm per cubic centimetre', () => {
    // Kinetic theory written otherwise: K = 4 pi r^2 sqrt(2) sqrt(8 kT/(pi m)), t = 2/(K N).
    const mass = (932 * 4 * Math.PI * 50e-9 ** 3) / 3
    const speed = Math.sqrt((8 * 1.380649e-23 * 150) / (Math.PI * mass))
    const expected_s = 2 / (4 * Math.PI * 50e-9 ** 2 * Math.SQRT2 * speed * 1e8)
    const time_s = coagulationTime(ice, 100e6, 150)
    expect(time_s / expected_s).toBeCloseTo(1, 12)
    expect(Math.abs(time_s / 86400 - 50)).toBeLessThan(0.5)
  })

  it('lets ice collect nuclei of 1 nm within 14 hours and of 2 nm within 37 hours', () => {
    // Computed from the kernel for 100 ice particles of 50 nm per cm3 at 150 K; nuclei of 2000 kg/m3, common practice.
    const hours = (radius_m: number) =>
      1 / (collisionKernel(ice, { radius_m, density: 2000 }, 150) * 100e6) / 3600
    expect(Math.abs(hours(1e-9) - 13.5)).toBeLessThan(0.1)
    expect(Math.abs(hours(2e-9) - 36.9)).toBeLessThan(0.1)
  })

  it('does not depend on which sphere is named first', () => {
    const nucleus = { radius_m: 1e-9, density: 2000 }
    expect(collisionKernel(ice, nucleus, 140)).toBeCloseTo(collisionKernel(nucleus, ice, 140), 25)
  })
})
