/** The rectangle that a panel plots into, in pixels from the upper left corner of the picture. */
export interface Frame {
  x: number
  y: number
  width: number
  height: number
}

/** Left and right edge: the range of a horizontal scale. */
export function horizontalRange({ x, width }: Frame): [number, number] {
  return [x, x + width]
}

/** Lower and upper edge: the range of a vertical scale, whose values grow upward. */
export function verticalRange({ y, height }: Frame): [number, number] {
  return [y + height, y]
}
