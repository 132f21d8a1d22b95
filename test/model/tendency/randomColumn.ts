import { centrePoint } from '../../../src/model/grid.ts'
import type { RandomStream } from '../../../src/model/numerics/random.ts'
import { resolve } from '../../../src/model/scenario/resolve.ts'
import type { ScenarioInput } from '../../../src/model/scenario/schema.ts'
import { type Column, prepareColumn } from '../../../src/model/state/column.ts'

/** A column of random settings, an instant and a state: every number is invented, within physical bounds. */
export interface RandomCase {
  column: Column
  time_s: number
  y: number[]
}

export function randomCase(random: RandomStream): RandomCase {
  const column = prepareColumn(resolve(randomDocument(random)).scenario)
  return { column, time_s: between(random, 600, 7000), y: randomState(random, column) }
}

export const between = ({ uniform }: RandomStream, low: number, high: number) =>
  low + (high - low) * uniform()

const oneOf = <T>({ uniform }: RandomStream, options: readonly T[]): T =>
  options[Math.floor(uniform() * options.length)]

const chance = ({ uniform }: RandomStream, probability: number) => uniform() < probability

function randomDocument(random: RandomStream): ScenarioInput {
  return {
    duration_h: 2,
    grid: { levels: oneOf(random, [8, 15, 24]) },
    sizes: { classes: oneOf(random, [8, 13, 20]), stretching: between(random, 1, 4) },
    temperature: { offset_K: between(random, -8, 8) },
    water: { factor: between(random, 0.5, 2) },
    wind: { factor: between(random, -2, 2) },
    mixing: { factor: between(random, 0.1, 2) },
    waves: chance(random, 0.5) ? [randomWave(random), randomWave(random)] : [],
    perturbations: chance(random, 0.4) ? randomPerturbations(random) : [],
    ice: {
      saturation: oneOf(random, ['murphy_koop_2005', 'iapws_2011', 'marti_mauersberger_1993']),
      amorphous_offset: oneOf(random, ['none', 'none', 'nucleation', 'growth', 'both']),
      particle_warming_K: oneOf(random, [0, 0, 1.5]),
      slip: oneOf(random, ['epstein_stokes', 'davies']),
    },
    nucleation: {
      scheme: oneOf(random, ['classical', 'classical', 'activation', 'off']),
      contact_parameter: between(random, 0.85, 0.98),
    },
    processes: {
      growth: chance(random, 0.9),
      sedimentation: chance(random, 0.9),
      diffusion: chance(random, 0.9),
      wind: chance(random, 0.9),
      closed: chance(random, 0.2),
    },
    numerics: { sublimation_ceiling_s: oneOf(random, [15, 60, 240]) },
  }
}

const randomWave = (random: RandomStream) => ({
  amplitude_K: between(random, 1, 6),
  period_h: between(random, 0.5, 8),
  vertical_wavelength_km: between(random, 5, 20),
  phase_deg: between(random, 0, 360),
  displacement_share: oneOf(random, [1, 1, 0.5, 0]),
  rise_h: 0.1,
})

function randomPerturbations(random: RandomStream): ScenarioInput['perturbations'] {
  const ramp = { shape: 'ramp' as const, start_h: 0, rise_h: 3 }
  return [
    { quantity: 'water', add_ppmv: between(random, 0, 2), time: ramp },
    { quantity: 'nuclei', factor: between(random, 0.5, 3), time: ramp },
    {
      quantity: 'temperature',
      add_K: between(random, -5, 5),
      altitude: { centre_km: 84, width_km: 3 },
    },
    { quantity: 'mixing', factor: between(random, 0.5, 2), time: { shape: 'step', start_h: 0.1 } },
  ]
}

/** Background vapour and nuclei times rough or smooth factors, and one of: no ice, a smooth layer, rough ice. */
function randomState(random: RandomStream, column: Column): number[] {
  const { layout, scenario, sizes, grid } = column
  const { rest } = column.atmosphere.basis(0)
  const roughness = oneOf(random, [0, 0.1, 1])
  const rough = () => Math.exp(roughness * random.normal())
  const ice = oneOf(random, ['none', 'layer', 'layer', 'everywhere'] as const)
  const centre_m = between(random, 80e3, 88e3)
  const width_m = between(random, 300, 2000)
  const radius_m = between(random, 3e-9, 80e-9)
  const y = new Array<number>(layout.length).fill(0)
  for (let level = 0; level < layout.levels; level++) {
    const density = rest.density_per_m3[centrePoint(level)]
    const height = (grid.centres_m[level] - centre_m) / width_m
    const amount = ice === 'none' ? 0 : ice === 'layer' ? Math.exp(-height * height) : 1
    y[layout.vapour + level] = density * 3e-6 * rough()
    let particles = 0
    for (let k = 0; k < layout.classes; k++) {
      const logRatio = Math.log(sizes.radii_m[k] / radius_m) / 0.4
      const number = 1e7 * amount * Math.exp(-logRatio * logRatio) * rough()
      y[layout.ice + level * layout.classes + k] = number < 1e-3 ? 0 : number
      particles += y[layout.ice + level * layout.classes + k]
    }
    scenario.background.nucleusClasses.forEach(({ share }, j) => {
      const place = level * layout.nucleusClasses + j
      y[layout.nuclei + place] = 2e9 * share * rough()
      y[layout.cores + place] = particles * share * rough()
    })
  }
  return y
}
