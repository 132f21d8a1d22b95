export type Colour = readonly [red: number, green: number, blue: number]

/** Lightness, green-red and blue-yellow of the OKLab space. */
type Lab = readonly [number, number, number]

const LIGHTEST = 0.985
const DARKEST = 0.27
const FIRST_HUE = 205
const LAST_HUE = 300
const STRONGEST_CHROMA = 0.125
const PATH_STEPS = 512

/** From almost white over blue to dark violet, along a curve in OKLab; not yet in equal steps. */
function pathPoint(share: number): Lab {
  const hue = ((FIRST_HUE + share * (LAST_HUE - FIRST_HUE)) * Math.PI) / 180
  const chroma = STRONGEST_CHROMA * Math.sin(0.85 * Math.PI * share ** 0.85)
  const lightness = LIGHTEST + share * (DARKEST - LIGHTEST)
  return [lightness, chroma * Math.cos(hue), chroma * Math.sin(hue)]
}

/** Companding of sRGB, IEC 61966-2-1, from memory. */
function companded(linear: number): number {
  const light = Math.min(1, Math.max(0, linear))
  const value = light <= 0.0031308 ? 12.92 * light : 1.055 * light ** (1 / 2.4) - 0.055
  return Math.round(255 * value)
}

/** OKLab to sRGB; matrices from memory, held by a test on white and grey. */
export function colourOfLab([lightness, a, b]: Lab): Colour {
  const long = (lightness + 0.3963377774 * a + 0.2158037573 * b) ** 3
  const middle = (lightness - 0.1055613458 * a - 0.0638541728 * b) ** 3
  const short = (lightness - 0.0894841775 * a - 1.291485548 * b) ** 3
  return [
    companded(4.0767416621 * long - 3.3077115913 * middle + 0.2309699292 * short),
    companded(-1.2684380046 * long + 2.6097574011 * middle - 0.3413193965 * short),
    companded(-0.0041960863 * long - 0.7034186147 * middle + 1.707614701 * short),
  ]
}

/** Distance travelled along the path up to each of its points. */
function pathLengths(): number[] {
  const lengths = [0]
  for (let step = 1; step <= PATH_STEPS; step++) {
    const here = pathPoint(step / PATH_STEPS)
    const before = pathPoint((step - 1) / PATH_STEPS)
    lengths.push(lengths[step - 1] + Math.hypot(...here.map((value, i) => value - before[i])))
  }
  return lengths
}

const LENGTHS = pathLengths()

/**
 * Perceptually uniform colours for an amount, light for nothing and dark for most: equal shares are equal distances in
 * OKLab, and lightness falls all the way, so that the order shows without colour vision and on paper.
 *
 * @param share from 0 to 1
 */
export function colourMap(share: number): Colour {
  const wanted = Math.min(1, Math.max(0, share)) * LENGTHS[PATH_STEPS]
  const after = LENGTHS.findIndex((length) => length >= wanted)
  if (after <= 0) return colourOfLab(pathPoint(0))
  const part = (wanted - LENGTHS[after - 1]) / (LENGTHS[after] - LENGTHS[after - 1])
  return colourOfLab(pathPoint((after - 1 + part) / PATH_STEPS))
}

export function cssColour([red, green, blue]: Colour): string {
  return `rgb(${red},${green},${blue})`
}
