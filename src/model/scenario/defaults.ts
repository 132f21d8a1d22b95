/**
 * The defaults of a scenario: the quiet polar-summer night. Every value stands beside the reason for it; the schema
 * builds its texts, and thus the user's documentation, from the two. 'From memory' and 'invented' mean what they say.
 */

export interface Default<T> {
  value: T
  reason: string
}

function because<T>(value: T, reason: string): Default<T> {
  return { value, reason }
}

const CLIMATOLOGY =
  'the 2007 polar-summer reference atmosphere, doi 10.5194/acpd-7-9973-2007 (read in a public copy)'

export const runDefaults = {
  title: because('untitled', 'a run needs no name'),
  duration_h: because(
    24,
    'a day brings a cloud from nothing to the heights, sizes and numbers that lidars see; in its last 6 h column ice still rises by an eighth, the ultraviolet albedo by a quarter',
  ),
  output_every_min: because(
    10,
    'the usual integration time of a lidar; common practice, no source',
  ),
}

export const gridDefaults = {
  bottom_km: because(77, 'on an ordinary summer night ice sublimates well above it'),
  top_km: because(96, 'air above the mesopause region is too warm for ice'),
  levels: because(
    128,
    'cells of 150 m: twice as many change the quiet brightness by less than 0.1 %, measured',
  ),
}

export const sizeDefaults = {
  smallest_nm: because(1, 'the size of the nuclei on which ice begins'),
  largest_nm: because(150, 'twice the largest radius seen in ordinary clouds'),
  classes: because(
    48,
    'twice as many change the Rayleigh brightness of the quiet night by 2 % and that under a wave of an hour by 9 %, measured; take 96 there',
  ),
  stretching: because(3, 'fine where ice is born; 2 costs about 0.5 % in brightness, measured'),
}

export const pressureDefaults = {
  altitude_km: because(88, 'the altitude of the polar-summer mesopause'),
  pressure_Pa: because(0.2, `rounded from 0.2014 Pa in ${CLIMATOLOGY}`),
}

export const temperatureDefaults = {
  knots: because(
    [
      { altitude_km: 70, temperature_K: 219 },
      { altitude_km: 77, temperature_K: 177 },
      { altitude_km: 80, temperature_K: 159 },
      { altitude_km: 81, temperature_K: 153.8 },
      { altitude_km: 82.5, temperature_K: 148.2 },
      { altitude_km: 85, temperature_K: 138 },
      { altitude_km: 88, temperature_K: 129 },
      { altitude_km: 91, temperature_K: 133 },
      { altitude_km: 94, temperature_K: 146 },
      { altitude_km: 97, temperature_K: 163 },
      { altitude_km: 100, temperature_K: 185 },
    ],
    'published rocket mean of 129 K at 88 km (doi 10.1029/91JD02018, abstract read); lapse rate steepening to the published -6 K/km below 80 km (doi 10.1029/JD094iD12p14647, abstract read); 150 K at 82 km, where about 150 K near 82.5 km is commonly quoted, from memory; in between invented, the gentle lapse at 81 to 82.5 km so that ice has gone where the air is far from saturation',
  ),
  offset_K: because(0, 'the profile is taken as it stands'),
  rebase_every_h: because(24, 'a season changes little in a day, and the step is booked'),
}

export const waterDefaults = {
  knots: because(
    [
      { altitude_km: 70, water_ppmv: 6 },
      { altitude_km: 77, water_ppmv: 5.5 },
      { altitude_km: 80, water_ppmv: 5 },
      { altitude_km: 83, water_ppmv: 3.6 },
      { altitude_km: 85, water_ppmv: 3.1 },
      { altitude_km: 88, water_ppmv: 1.8 },
      { altitude_km: 92, water_ppmv: 1 },
      { altitude_km: 96, water_ppmv: 0.6 },
      { altitude_km: 100, water_ppmv: 0.4 },
    ],
    `invented on the pattern of ${CLIMATOLOGY}: within 8 % of it up to 83 km and from 96 km on, a fifth more at 85 to 92 km, since a climatology includes air that ice has already dried`,
  ),
  factor: because(1, 'the profile is taken as it stands'),
}

export const windDefaults = {
  knots: because(
    [
      { altitude_km: 70, wind_cm_per_s: 1 },
      { altitude_km: 77, wind_cm_per_s: 4 },
      { altitude_km: 83, wind_cm_per_s: 5 },
      { altitude_km: 87, wind_cm_per_s: 4 },
      { altitude_km: 90, wind_cm_per_s: 3 },
      { altitude_km: 94, wind_cm_per_s: 1.5 },
      { altitude_km: 100, wind_cm_per_s: 0.5 },
    ],
    'invented, inside the 1 to 5 cm/s upwelling of common practice (no source); at its upper end at 83 km, so that ice is held up long enough to reach 50 nm within a day',
  ),
  factor: because(1, 'the profile is taken as it stands'),
}

export const mixingDefaults = {
  knots: because(
    [
      { altitude_km: 70, mixing_m2_per_s: 10 },
      { altitude_km: 81.5, mixing_m2_per_s: 10 },
      { altitude_km: 83, mixing_m2_per_s: 20 },
      { altitude_km: 88, mixing_m2_per_s: 40 },
      { altitude_km: 91, mixing_m2_per_s: 30 },
      { altitude_km: 96, mixing_m2_per_s: 25 },
      { altitude_km: 100, mixing_m2_per_s: 25 },
    ],
    'invented, inside the 10 to 100 m2/s of common practice (no source); least below the layer, so that mixing spreads little ice into the dry air there; strong mixing above 90 km would only shorten the steps of the integration',
  ),
  factor: because(1, 'the profile is taken as it stands'),
}

export const nucleusDefaults = {
  knots: because(
    [
      { altitude_km: 70, nuclei_per_cm3: 400 },
      { altitude_km: 77, nuclei_per_cm3: 1100 },
      { altitude_km: 80, nuclei_per_cm3: 2000 },
      { altitude_km: 83, nuclei_per_cm3: 3500 },
      { altitude_km: 86, nuclei_per_cm3: 5000 },
      { altitude_km: 89, nuclei_per_cm3: 5500 },
      { altitude_km: 93, nuclei_per_cm3: 4000 },
      { altitude_km: 97, nuclei_per_cm3: 2000 },
      { altitude_km: 100, nuclei_per_cm3: 700 },
    ],
    'invented; some thousands of smoke particles per cm3 are common practice, no source',
  ),
  classes: because(
    [
      { radius_nm: 1, share: 0.5 },
      { radius_nm: 2, share: 0.3 },
      { radius_nm: 3, share: 0.2 },
    ],
    'invented; more small smoke particles than large ones, with enough large ones that the mature cloud holds about 100 to 30 ice particles per cm3 from top to bottom',
  ),
  factor: because(1, 'the profile is taken as it stands'),
}

export const photolysisDefaults = {
  knots: because(
    [
      { altitude_km: 70, lifetime_d: 100 },
      { altitude_km: 80, lifetime_d: 30 },
      { altitude_km: 85, lifetime_d: 10 },
      { altitude_km: 90, lifetime_d: 3 },
      { altitude_km: 96, lifetime_d: 1.5 },
      { altitude_km: 100, lifetime_d: 1 },
    ],
    'order of 30 d at 80 km, 10 d at 85 km and 2 to 4 d at 90 km, from memory; the ends are invented',
  ),
  enabled: because(true, 'the polar-summer mesosphere is sunlit all day'),
}
