import type { Perturbation } from '../scenario/types.ts'
import type { InjectionRates } from './airState.ts'
import type { RestingAir } from './restingAir.ts'

/**
 * Rates at which ramped perturbations of water and nuclei change the column while they rise:
 *   added mole fraction   dq/dt = a w(z)/rise          ('add')
 *   relative growth       dq/dt = q ln(1 + (f - 1) w(z))/rise   ('multiply')
 * so that over the whole rise they add a w or multiply by 1 + (f - 1) w. The fall of a ramp takes nothing back.
 */
export function readInjectionRates(
  rates: InjectionRates,
  perturbations: readonly Perturbation[],
  weights: readonly Float64Array[],
  { time_s, rest }: { time_s: number; rest: RestingAir },
): void {
  if (rates.active) clear(rates)
  perturbations.forEach((change, index) => {
    const { quantity, time } = change
    if (quantity !== 'water' && quantity !== 'nuclei') return
    if (time.shape !== 'ramp' || time_s < time.start_s || time_s >= time.start_s + time.rise_s)
      return
    rates.active = true
    const added = quantity === 'water' ? rates.waterAdded_per_s : rates.nucleiAdded_per_s
    const gain = quantity === 'water' ? rates.waterGain_per_s : rates.nucleiGain_per_s
    weights[index].forEach((weight, i) => {
      if (change.mode === 'multiply') {
        gain[i] += Math.log(1 + (change.amount - 1) * weight) / time.rise_s
      } else {
        const density = quantity === 'nuclei' ? rest.density_per_m3[i] : 1
        added[i] += (change.amount * weight) / density / time.rise_s
      }
    })
  })
}

function clear(rates: InjectionRates): void {
  rates.active = false
  rates.waterAdded_per_s.fill(0)
  rates.waterGain_per_s.fill(0)
  rates.nucleiAdded_per_s.fill(0)
  rates.nucleiGain_per_s.fill(0)
}
