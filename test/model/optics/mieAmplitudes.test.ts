import { describe, expect, it } from 'vitest'
import { mieAmplitudes } from '../../../src/model/optics/mieAmplitudes.ts'
import { mieCoefficients } from '../../../src/model/optics/mieCoefficients.ts'
import { mieEfficiencies } from '../../../src/model/optics/mieEfficiencies.ts'

/**
 * Example of Bohren and Huffman 1983, Appendix A (index 1.55, radius 0.525 um, wavelength 0.6328 um), computed
 * independently at 50 digits: angle in degrees, S11/S11(0), polarisation -S12/S11, S33/S11, S34/S11. The printed
 * 0.785390 at 9 degrees agrees (from memory).
 */
const pattern: readonly (readonly [number, number, number, number, number])[] = [
  [0, 1, 0, 1, 0],
  [9, 0.785390429962, -0.00459811227393, 0.999400107836, 0.03432610989],
  [18, 0.356897062474, -0.0458540520696, 0.986021504359, 0.160184265305],
  [27, 0.0766118614506, -0.36474445116, 0.843602519462, 0.394076483066],
  [36, 0.0355355169651, -0.534997156381, 0.686967187424, -0.491786667232],
  [45, 0.0701844789058, 0.0095995262802, 0.959825186076, -0.280434415271],
  [54, 0.0574313378218, 0.047792683489, 0.985371112254, 0.163583711106],
  [63, 0.0219659613162, -0.440603813169, 0.648042867805, 0.62121551921],
  [72, 0.012595886377, -0.831995654763, 0.20325513396, -0.516207885424],
  [81, 0.0173750065259, 0.0341670083686, 0.795353673505, -0.605181914453],
  [90, 0.0124600805151, 0.230462452703, 0.937497054028, 0.260741886899],
  [99, 0.00679092815456, -0.71347187774, -0.00717397538374, 0.700647139259],
  [108, 0.00954238601419, -0.756255383995, -0.0394747540943, -0.653084633082],
  [117, 0.00863418530172, -0.281215305898, 0.536250514918, -0.795834993562],
  [126, 0.00227421171909, -0.23961179218, 0.967601795957, 0.0795798561804],
  [135, 0.00543997531841, -0.85080369701, 0.187530757932, -0.490882148773],
  [144, 0.0160243494612, -0.706334436197, 0.495254374594, -0.50578134474],
  [153, 0.0188852378986, -0.891081174237, 0.453276824966, -0.0226817298439],
  [162, 0.0195253859208, -0.783319476977, -0.391613188605, 0.482752221641],
  [171, 0.0301676080666, -0.196193900465, -0.96206893935, 0.189555557447],
  [180, 0.0383189125145, 0, -1, 0],
]

describe('scattering amplitudes of a sphere', () => {
  const x = (2 * Math.PI * 0.525) / 0.6328
  const coefficients = mieCoefficients(x, { n: 1.55, k: 0 })

  it('give pattern, polarisation and phase at the 21 angles of the example', () => {
    const ahead = matrix(coefficients, 0).s11
    expect(Math.abs(ahead / 518.619308641781 - 1)).toBeLessThan(1e-13)
    for (const [angle_deg, ratio, polarisation, s33, s34] of pattern) {
      const found = matrix(coefficients, (angle_deg * Math.PI) / 180)
      const place = `${angle_deg} degrees`
      // Twelve digits given; S11 is small in the minima, where the amplitudes cancel by a hundredfold.
      expect(Math.abs(found.s11 / ahead / ratio - 1), place).toBeLessThan(1e-11)
      expect(Math.abs(-found.s12 / found.s11 - polarisation), place).toBeLessThan(1e-11)
      expect(Math.abs(found.s33 / found.s11 - s33), place).toBeLessThan(1e-11)
      expect(Math.abs(found.s34 / found.s11 - s34), place).toBeLessThan(1e-11)
    }
  })

  it('give the efficiencies and the asymmetry of the example', () => {
    const found = mieEfficiencies(x, { n: 1.55, k: 0 })
    // Computed independently at 50 digits, of which doubles keep about 14; Q_back in the 4 pi convention.
    expect(Math.abs(found.extinction / 3.10542553146588 - 1)).toBeLessThan(1e-13)
    expect(Math.abs(found.backscatter / 2.92534064970601 - 1)).toBeLessThan(1e-12)
    expect(Math.abs(found.asymmetry / 0.633136758040895 - 1)).toBeLessThan(1e-13)
  })

  it('turn into each other straight ahead, and each other reversed straight back', () => {
    const ahead = mieAmplitudes(coefficients, 0)
    expect(ahead.s1Re).toBeCloseTo(ahead.s2Re, 12)
    expect(ahead.s1Im).toBeCloseTo(ahead.s2Im, 12)
    const back = mieAmplitudes(coefficients, Math.PI)
    expect(back.s1Re).toBeCloseTo(-back.s2Re, 12)
    expect(back.s1Im).toBeCloseTo(-back.s2Im, 12)
  })
})

/** Elements of the scattering matrix (Bohren and Huffman 1983, chapter 4, from memory). */
function matrix(coefficients: Parameters<typeof mieAmplitudes>[0], angle_rad: number) {
  const { s1Re, s1Im, s2Re, s2Im } = mieAmplitudes(coefficients, angle_rad)
  const first = s1Re * s1Re + s1Im * s1Im
  const second = s2Re * s2Re + s2Im * s2Im
  return {
    s11: (second + first) / 2,
    s12: (second - first) / 2,
    s33: s2Re * s1Re + s2Im * s1Im,
    s34: s2Im * s1Re - s2Re * s1Im,
  }
}
