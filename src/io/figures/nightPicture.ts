import { type BrightnessSeries, brightnessChart } from './brightnessChart.ts'
import { element, words } from './element.ts'
import type { Frame } from './frame.ts'
import { FONT, INKS } from './inks.ts'
import { cropped, largestValue, type TimeHeightField } from './timeHeightField.ts'
import { timeHeightMap } from './timeHeightMap.ts'

/** What the picture of a run shows. */
export interface Night {
  title: string
  /** The picture in words, for those who do not see it. */
  description: string
  iceWaterContent: TimeHeightField
  saturationRatio: TimeHeightField
  brightness: BrightnessSeries
}

const SIZE = { width: 860, height: 640 }
const MAP: Frame = { x: 72, y: 72, width: 632, height: 290 }
const CHART: Frame = { x: 72, y: 412, width: 632, height: 176 }

/** Altitudes with more than this share of the largest ice water content are shown, and some air around them. */
const FAINTEST = 0.01
const AIR_AROUND_KM = 1

/** The altitudes in which there is ice worth showing; all of them where there is none. */
function cloudAltitudes(field: TimeHeightField): [number, number] {
  const { altitudes_km, values } = field
  const faintest = FAINTEST * largestValue(field)
  const count = altitudes_km.length
  let [lowest, highest] = [count - 1, 0]
  values.forEach((value, i) => {
    if (value <= faintest) return
    lowest = Math.min(lowest, i % count)
    highest = Math.max(highest, i % count)
  })
  if (lowest > highest) return [altitudes_km[0], altitudes_km[count - 1]]
  return [altitudes_km[lowest] - AIR_AROUND_KM, altitudes_km[highest] + AIR_AROUND_KM]
}

/** A run in one picture: the ice against time and altitude, and below it what an observer sees. An SVG document. */
export function nightPicture(night: Night): string {
  const altitudes = cloudAltitudes(night.iceWaterContent)
  const line = {
    field: cropped(night.saturationRatio, altitudes),
    value: 1,
    label: 'saturation ratio 1',
  }
  const heading = { x: MAP.x, y: 30, fill: INKS.words, 'font-size': 16, 'font-weight': 'bold' }
  return element(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      viewBox: `0 0 ${SIZE.width} ${SIZE.height}`,
      ...SIZE,
      'font-family': FONT,
      role: 'img',
      'aria-labelledby': 'title description',
    },
    words('title', { id: 'title' }, night.title),
    words('desc', { id: 'description' }, night.description),
    element('rect', { ...SIZE, rx: 8, fill: INKS.ground }),
    words('text', heading, night.title),
    timeHeightMap(cropped(night.iceWaterContent, altitudes), line, MAP),
    brightnessChart(night.brightness, CHART),
  )
}
