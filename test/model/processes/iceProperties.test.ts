import { describe, expect, it } from 'vitest'
import { WATER_MOLAR_MASS } from '../../../src/model/constants.ts'
import { amorphousPressureFactor } from '../../../src/model/processes/amorphousPressureFactor.ts'
import { criticalRadius } from '../../../src/model/processes/criticalRadius.ts'
import { iceDensity } from '../../../src/model/processes/iceDensity.ts'
import { kelvinFactor } from '../../../src/model/processes/kelvinFactor.ts'
import { kelvinRadius } from '../../../src/model/processes/kelvinRadius.ts'
import { latentHeat } from '../../../src/model/processes/latentHeat.ts'
import { moleculeVolume } from '../../../src/model/processes/moleculeVolume.ts'
import { saturationPressure } from '../../../src/model/processes/saturationPressure.ts'
import { surfaceEnergy } from '../../../src/model/processes/surfaceEnergy.ts'

describe('density of ice', () => {
  it('gives the check values of IAPWS R10-06(2009) to all printed digits', () => {
    // Specific volume, m3/kg, read in public copies; twelve digits printed, half a unit of the last.
    const table: [number, number, number][] = [
      [273.16, 611.657, 1.09085812737e-3],
      [273.152519, 101325, 1.09084388214e-3],
      [100, 100e6, 1.0619338926e-3],
    ]
    for (const [temperature_K, pressure_Pa, volume] of table) {
      const error = 1 / iceDensity(temperature_K, pressure_Pa) - volume
      expect(Math.abs(error), `${temperature_K} K`).toBeLessThanOrEqual(0.5e-14)
    }
  })

  it('falls with temperature at low pressure as computed independently from IAPWS R10-06(2009)', () => {
    const table: [number, number][] = [
      [100, 933.0398],
      [120, 932.3177],
      [130, 931.8328],
      [140, 931.2618],
      [150, 930.605],
      [170, 929.0415],
      [273.15, 916.7109],
    ]
    // Four decimals kept in the table.
    for (const [temperature_K, density] of table) {
      expect(Math.abs(iceDensity(temperature_K, 1) - density)).toBeLessThanOrEqual(0.51e-4)
    }
  })
})

describe('latent heat of sublimation', () => {
  it('gives the value of Murphy and Koop 2005, eq. 5, at the melting point', () => {
    // 51059.029186873086 J/mol at 273.15 K, read in a public copy; only rounding is left.
    expect(latentHeat(273.15)).toBeCloseTo(51059.029186873086, 8)
  })

  it('gives J/kg at the temperatures of the mesopause', () => {
    // Computed independently at high precision from the published formula; six digits kept.
    const table: [number, number][] = [
      [120, 2.78838e6],
      [140, 2.803447e6],
      [150, 2.809994e6],
      [160, 2.815892e6],
    ]
    for (const [temperature_K, perKilogram] of table) {
      const error = latentHeat(temperature_K) / WATER_MOLAR_MASS / perKilogram - 1
      expect(Math.abs(error)).toBeLessThan(1e-6)
    }
  })

  it('agrees with the slope of the vapour pressure by the law of Clausius and Clapeyron', () => {
    // L = R T^2 d ln p/dT; Murphy and Koop made eq. 7 from eq. 5, and the two agree within a few parts in ten thousand.
    for (const temperature_K of [120, 140, 160, 200, 250]) {
      const step_K = 0.01
      const slope =
        Math.log(
          saturationPressure('murphyKoop2005', temperature_K + step_K) /
            saturationPressure('murphyKoop2005', temperature_K - step_K),
        ) /
        (2 * step_K)
      const fromSlope = 8.314462618 * temperature_K ** 2 * slope
      expect(Math.abs(latentHeat(temperature_K) / fromSlope - 1)).toBeLessThan(1e-3)
    }
  })
})

describe('surface energy and curvature', () => {
  it('takes Kelvin, not Celsius, in the surface energy', () => {
    // Arithmetic of 0.141 - 1.5e-4 T (Hale and Plummer 1974) at two temperatures.
    expect(surfaceEnergy(150)).toBeCloseTo(0.1185, 12)
    expect(surfaceEnergy(273.15)).toBeCloseTo(0.1000275, 12)
  })

  it('gives the Kelvin radius with the density of ice at that temperature', () => {
    // Computed independently: 2 sigma v_m/(kT) in nm with the IAPWS density; four decimals kept here.
    const table: [number, number][] = [
      [110, 5.2585],
      [130, 4.3464],
      [140, 3.9886],
      [150, 3.6787],
      [160, 3.4079],
      [273.15, 1.7311],
    ]
    for (const [temperature_K, radius_nm] of table) {
      const radius_m = kelvinRadius(temperature_K, iceDensity(temperature_K, 1))
      expect(Math.abs(radius_m * 1e9 - radius_nm)).toBeLessThan(0.6e-4)
    }
  })

  it('has r* ln S equal to the Kelvin radius for any supersaturation', () => {
    // 3.679 nm at 150 K with 930.605 kg/m3, computed independently; four digits kept.
    for (const saturationRatio of [1.01, 2, 10, 300]) {
      const product = criticalRadius(150, saturationRatio, 930.605) * Math.log(saturationRatio)
      expect(Math.abs(product * 1e9 - 3.679)).toBeLessThan(0.5e-3)
    }
  })

  it('has no critical radius without supersaturation', () => {
    expect(criticalRadius(150, 1, 932)).toBe(Number.POSITIVE_INFINITY)
    expect(criticalRadius(150, 0.3, 932)).toBe(Number.POSITIVE_INFINITY)
  })

  it('raises the vapour pressure by e at the Kelvin radius and by S at the critical radius', () => {
    expect(kelvinFactor(kelvinRadius(140, 932), 140, 932)).toBeCloseTo(Math.E, 12)
    expect(kelvinFactor(criticalRadius(140, 17, 932), 140, 932)).toBeCloseTo(17, 10)
  })

  it('packs a mole of molecules into the molar volume', () => {
    // 18.01528 g/mol over 932 kg/m3 is 19.32970 cm3/mol; Avogadro constant exact in the SI.
    expect(moleculeVolume(932) * 6.02214076e23 * 1e6).toBeCloseTo(19.3297, 4)
  })
})

describe('vapour pressure of ice from amorphous water', () => {
  it('exceeds that of hexagonal ice by the published offset', () => {
    // exp(982/RT), Nachbar et al. 2018, computed independently; three digits kept.
    expect(amorphousPressureFactor(130)).toBeCloseTo(2.48, 2)
    expect(amorphousPressureFactor(140)).toBeCloseTo(2.325, 2)
    expect(amorphousPressureFactor(150)).toBeCloseTo(2.2, 2)
  })

  it('lies in the published range of 100 to 200 per cent between 120 and 160 K', () => {
    for (const temperature_K of [120, 130, 140, 150, 160]) {
      expect(amorphousPressureFactor(temperature_K)).toBeGreaterThan(2)
      expect(amorphousPressureFactor(temperature_K)).toBeLessThan(3)
    }
  })
})
