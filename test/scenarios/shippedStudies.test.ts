import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { shippedNames } from '../../src/io/scenario/scenarioLayers.ts'
import { loadStudy, shippedStudies } from '../../src/io/study/loadStudy.ts'
import { memberParameters, planStudy } from '../../src/model/experiments/study.ts'

const scenarioDirectory = fileURLToPath(new URL('../../scenarios/', import.meta.url))

function plan(name: string) {
  const request = { set: [], scenarioDirectory, workingDirectory: scenarioDirectory }
  const { study, base } = loadStudy(name, request)
  return planStudy(study, base.document)
}

describe('the shipped studies', () => {
  it.each(shippedNames(shippedStudies(scenarioDirectory)))('%s can be run as it is', (name) => {
    expect(plan(name).memberCount).toBeGreaterThan(1)
    expect(plan(name).warnings).toEqual([])
  })

  it('ask for brightness against water vapour, 1 to 10 ppmv at three temperatures', () => {
    const study = plan('brightness-against-water')
    const members = Array.from({ length: study.memberCount }, (_, i) => memberParameters(study, i))
    const water = members.map((member) => member['water.at_83km_ppmv'] as number)
    expect([Math.min(...water), Math.max(...water)]).toEqual([1, 10])
    expect(new Set(members.map((member) => member['temperature.offset_K'])).size).toBe(3)
  })

  it('ask for the shares of temperature, water, nuclei and a wave in the spread of brightness', () => {
    const { design, axes, memberCount } = plan('four-causes')
    expect(design.kind).toBe('sobol')
    expect(axes.map(({ key }) => key)).toEqual([
      'temperature.offset_K',
      'water.factor',
      'nuclei.factor',
      'waves.0.amplitude_K',
    ])
    // 64 samples, and for Sobol indices two more blocks than axes.
    expect(memberCount).toBe(64 * 6)
  })
})
