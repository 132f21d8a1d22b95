/** Colours of lines and words on the light ground of every picture; they differ in lightness as well as in hue. */
export const INKS = {
  ground: '#ffffff',
  words: '#1f2328',
  axis: '#57606a',
  grid: '#e3e6ea',
  first: '#1b3a8a',
  second: '#c2410c',
} as const

export const FONT = 'system-ui, "Segoe UI", Helvetica, Arial, "DejaVu Sans", sans-serif'
