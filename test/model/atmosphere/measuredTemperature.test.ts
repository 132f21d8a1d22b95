import { describe, expect, it } from 'vitest'
import { measuredTemperature } from '../../../src/model/atmosphere/measuredTemperature.ts'

const table = {
  altitudes_m: [83e3, 88e3],
  times_s: [3600, 7200],
  values: [
    [150, 130],
    [152, 132],
  ],
  logarithmic: false,
}
const altitudes_m = Float64Array.of(81e3, 82.5e3, 83e3, 85.5e3, 88e3, 90e3)
const background = () => new Float64Array(altitudes_m.length).fill(140)
const measured = measuredTemperature(table, altitudes_m)

function at(time_s: number, middle_s = time_s): number[] {
  const temperature_K = background()
  measured.replace({ time_s, middle_s }, temperature_K)
  return Array.from(temperature_K)
}

describe('a measured temperature', () => {
  it('replaces the background between its altitudes, linear in time', () => {
    expect(at(5400).slice(2, 5)).toEqual([151, 141, 131])
  })

  it('fades to the background within a kilometre beyond them', () => {
    const [far, near] = at(3600)
    expect(far).toBe(140)
    expect(near).toBe(145)
    expect(at(3600)[5]).toBe(140)
  })

  it('leaves the background alone before its first and after its last time', () => {
    expect(at(1800)).toEqual(Array.from(background()))
    expect(at(9000)).toEqual(Array.from(background()))
  })

  it('belongs wholly to one side of an interval that starts at its end', () => {
    expect(at(7200, 7500)).toEqual(Array.from(background()))
  })
})
