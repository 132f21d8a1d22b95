import { describe, expect, it } from 'vitest'
import { nightPicture } from '../../../src/io/figures/nightPicture.ts'
import { madeField, madeNight } from './night.ts'

describe('nightPicture', () => {
  const svg = nightPicture(madeNight())

  it('names the quantity and the unit of every axis', () => {
    const titles = [
      'altitude, km',
      'mass of ice per volume, ng m⁻³',
      'brightness, sr⁻¹',
      'time since the start of the run, h',
    ]
    for (const title of titles) expect(svg).toContain(`>${title}</text>`)
  })

  it('tells in words what it shows', () => {
    expect(svg).toContain('role="img" aria-labelledby="title description"')
    expect(svg).toContain('<title id="title">A night</title>')
    expect(svg).toContain('<desc id="description">A layer at 83 km.</desc>')
  })

  it('stands on its own light ground and refers to nothing outside itself', () => {
    expect(svg).toContain('fill="#ffffff"')
    expect(svg.match(/href="(?!data:)/)).toBeNull()
  })

  it('says which brightness is an upper bound', () => {
    expect(svg).toContain('>Rayleigh (upper bound)</text>')
    expect(svg).toContain('>Lorenz-Mie spheres</text>')
  })

  it('opens and closes every element, whatever the title holds', () => {
    const odd = nightPicture(madeNight('Wet & "dry" <nights>'))
    expect(odd).toContain('Wet &amp; &quot;dry&quot; &lt;nights&gt;')
    const opened = odd.match(/<[a-z][^>]*>/gi)?.filter((tag) => !tag.endsWith('/>'))
    expect(opened?.length).toBeGreaterThan(10)
    expect(odd.match(/<\/[a-z]+>/gi)?.length).toBe(opened?.length)
  })

  it('shows empty air without a layer', () => {
    const iceWaterContent = madeField('mass of ice per volume', 'ng m-3', () => 0)
    const empty = nightPicture({ ...madeNight(), iceWaterContent })
    expect(empty).not.toMatch(/NaN|Infinity/)
    expect(empty).not.toContain('url(#layer)')
  })
})
