const DECIMALS = 1

/** The path through points in pixels; where one is not a number, the line breaks. */
export function linePath(xs: ArrayLike<number>, ys: ArrayLike<number>): string {
  let path = ''
  let drawing = false
  for (let i = 0; i < xs.length; i++) {
    const inside = Number.isFinite(xs[i]) && Number.isFinite(ys[i])
    if (inside) path += `${drawing ? 'L' : 'M'}${short(xs[i])},${short(ys[i])}`
    drawing = inside
  }
  return path
}

function short(pixels: number): string {
  return String(Number(pixels.toFixed(DECIMALS)))
}
