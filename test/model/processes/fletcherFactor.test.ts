import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fletcherFactor } from '../../../src/model/processes/fletcherFactor.ts'

const ratios = [0, 0.01, 0.1, 0.5, 0.9, 1, 1.1, 1.5, 2, 3, 5, 10, 30, 100, 1000]

/**
 * Contact parameter m, then f(m, x) for each ratio, then the plane limit (2 + m)(1 - m)^2 / 4. Computed independently
 * at 60 digits from the formula of Fletcher 1958, J. Chem. Phys. 29, 572 (formula from memory), 12 digits kept.
 */
const table = [
  [-1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1],
  [
    -0.5, 1, 0.999981559357, 0.998407899508, 0.977859456942, 0.955778846626, 0.950961894323,
    0.946449568232, 0.931169872488, 0.916994755742, 0.898650701958, 0.880067657127, 0.863317209021,
    0.850607460264, 0.845843607746, 0.84396077935, 0.84375,
  ],
  [
    0, 1, 0.999925994375, 0.993443905435, 0.904508497187, 0.811937654541, 0.792893218813,
    0.77550911894, 0.720142633969, 0.673762078751, 0.620639888569, 0.574021916977, 0.537375698471,
    0.512495373262, 0.503749875007, 0.500374999875, 0.5,
  ],
  [
    0.3, 1, 0.999874681823, 0.988713114413, 0.829270816206, 0.667285015782, 0.635874415183,
    0.60798047191, 0.524719268195, 0.462051619322, 0.398308088125, 0.349001321323, 0.314154208722,
    0.29225499451, 0.284869310036, 0.282060677203, 0.28175,
  ],
  [
    0.5, 1, 0.999832934315, 0.98477868873, 0.762259526419, 0.54041516788, 0.5, 0.465199061751,
    0.368545973643, 0.303847577293, 0.245427339249, 0.205115092277, 0.178974625563, 0.163458941308,
    0.158375247712, 0.156461095756, 0.15625,
  ],
  [
    0.8, 1, 0.999758943263, 0.977635856237, 0.626869176962, 0.287413812651, 0.236754446797,
    0.197878493823, 0.114752387411, 0.0775698764503, 0.0534387935526, 0.0405845398161,
    0.0335043285293, 0.0296869443358, 0.0284918888259, 0.0280486583764, 0.028,
  ],
  [
    0.9, 1, 0.999731235294, 0.974908196484, 0.568513789697, 0.176909539964, 0.127639320225,
    0.0943896222488, 0.0402586626372, 0.0236385127882, 0.014958428488, 0.0108998300071,
    0.00880998129161, 0.0077223645001, 0.00738722385573, 0.00726355579672, 0.00725,
  ],
  [
    0.95, 1, 0.999716808758, 0.973476951175, 0.535764746784, 0.111906762507, 0.0670943058496,
    0.0417980947162, 0.0125773855151, 0.00661495672365, 0.00396774252064, 0.00282514871469,
    0.00225816147977, 0.0019684657414, 0.00187991281949, 0.00184731992998, 0.00184375,
  ],
  [
    0.98, 1, 0.999707969395, 0.97259630268, 0.514709544924, 0.0663963698723, 0.028, 0.0125631908679,
    0.00237191717275, 0.00113917895586, 0.000658459480339, 0.000461973033347, 0.000366725327761,
    0.00031860578525, 0.000303968180313, 0.000298588925571, 0.000298,
  ],
  [
    0.99, 1, 0.999704992348, 0.972299074873, 0.507426220801, 0.0488234867191, 0.0142928932188,
    0.0045444599779, 0.000631110820485, 0.000292204176422, 0.000166661753666, 0.000116336710236,
    9.21361552166e-5, 7.99563592268e-5, 7.6257384027e-5, 7.48987245685e-5, 7.475e-5,
  ],
  [1, 1, 0.999702, 0.972, 0.5, 0.028, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0],
]

/** The printed form, good to about 1e-12 for moderate x. Fletcher 1958, from memory. */
function printedForm(m: number, x: number): number {
  const phi = Math.sqrt(1 - 2 * m * x + x * x)
  const u = (x - m) / phi
  return (
    (1 + ((1 - m * x) / phi) ** 3 + x ** 3 * (2 - 3 * u + u ** 3) + 3 * m * x * x * (u - 1)) / 2
  )
}

describe('the geometric factor of nucleation on a sphere', () => {
  it('equals the 60-digit table within 1e-10, the table printing 12 digits', () => {
    for (const [m = 0, ...row] of table) {
      ratios.forEach((x, i) => {
        const expected = row[i] ?? Number.NaN
        const error = Math.abs(fletcherFactor(m, x) - expected)
        expect(error, `m ${m}, x ${x}`).toBeLessThanOrEqual(1e-10 * expected)
      })
    }
  })

  it('tends to the plane limit like 1/x, out to a nucleus a billion times the germ', () => {
    for (const row of table) {
      const m = row[0] ?? Number.NaN
      const plane = row.at(-1) ?? Number.NaN
      // The leading correction is of order (1 - m^2)^2/x; at 1e9 it is far below 1e-7 of the limit for all m below 1.
      expect(Math.abs(fletcherFactor(m, 1e9) - plane)).toBeLessThanOrEqual(1e-7 * plane)
    }
  })

  it('has the closed forms at its borders', () => {
    // Algebra: f(m, 0) = 1, f(-1, x) = 1, f(1, x) = (1 - x)^2 (1 + 2x) below x = 1 and 0 from there on.
    for (const x of [0, 0.2, 0.7, 1, 1.5, 40]) {
      expect(fletcherFactor(-1, x)).toBeCloseTo(1, 12)
      expect(fletcherFactor(1, x)).toBeCloseTo(x < 1 ? (1 - x) ** 2 * (1 + 2 * x) : 0, 12)
    }
    for (const m of [-1, -0.3, 0, 0.6, 1]) expect(fletcherFactor(m, 0)).toBeCloseTo(1, 14)
  })

  it('equals the printed form on both sides of the switch at m x = 1', () => {
    for (const m of [0.1, 0.3, 0.5, 0.8, 0.9, 0.95, 0.98]) {
      for (const shift of [-1e-3, -1e-9, 0, 1e-9, 1e-3]) {
        const x = (1 + shift) / m
        // At x up to 10 the printed form loses about three of sixteen digits, and f is above 1e-3 here.
        expect(fletcherFactor(m, x) / printedForm(m, x)).toBeCloseTo(1, 9)
      }
    }
  })

  it('lies between 0 and 1 and falls as wetting improves or as the nucleus grows', () => {
    const anyM = fc.double({ min: -1, max: 1, noNaN: true })
    const anyX = fc.double({ min: 0, max: 1e6, noNaN: true })
    // Rounding may lift a constant stretch by a few units of 1e-16.
    const slack = 1e-14
    fc.assert(
      fc.property(anyM, anyM, anyX, anyX, (m1, m2, x1, x2) => {
        const [less, more] = [Math.min(m1, m2), Math.max(m1, m2)]
        const [small, large] = [Math.min(x1, x2), Math.max(x1, x2)]
        const f = fletcherFactor(less, small)
        expect(f).toBeGreaterThanOrEqual(0)
        expect(f).toBeLessThanOrEqual(1 + slack)
        expect(fletcherFactor(more, small)).toBeLessThanOrEqual(f + slack)
        expect(fletcherFactor(less, large)).toBeLessThanOrEqual(f + slack)
      }),
      { seed: 11, numRuns: 2000 },
    )
  })
})
