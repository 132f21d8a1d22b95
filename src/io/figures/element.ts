type Attributes = Record<string, string | number>

const ESCAPES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' }
const DECIMALS = 2

function escaped(text: string): string {
  return text.replace(/[&<>"]/g, (character) => ESCAPES[character])
}

/** A hundredth of a pixel is finer than any screen. */
function written(value: string | number): string {
  return typeof value === 'number' ? String(Number(value.toFixed(DECIMALS))) : escaped(value)
}

/** An SVG element as text; the children are elements already. */
export function element(name: string, attributes: Attributes, ...children: string[]): string {
  const pairs = Object.entries(attributes).map(([key, value]) => ` ${key}="${written(value)}"`)
  const head = `<${name}${pairs.join('')}`
  return children.length === 0 ? `${head}/>` : `${head}>${children.join('')}</${name}>`
}

/** An SVG element that holds words, such as text, title or desc. */
export function words(name: string, attributes: Attributes, text: string): string {
  return element(name, attributes, escaped(text))
}
