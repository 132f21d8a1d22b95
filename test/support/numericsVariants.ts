/** Settings of the integration that must not show in the brightness. */

export const ceilings = (seconds: number) => ({
  numerics: { sublimation_ceiling_s: seconds, nucleation_ceiling_s: seconds },
})

/** The default tolerances over a hundred. */
export const TIGHT = {
  numerics: {
    relative_tolerance: 1e-5,
    absolute_tolerance_ice_per_m3: 1e-2,
    absolute_tolerance_vapour_per_m3: 1e7,
  },
}

/** 5 K, one hour, 10 km: ordinary sizes, common practice, no source. */
export const ONE_HOUR_WAVE = {
  waves: [{ amplitude_K: 5, at_km: 85, period_h: 1, vertical_wavelength_km: 10 }],
}
