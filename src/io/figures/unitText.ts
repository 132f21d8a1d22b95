const RAISED: Record<string, string> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
}

/** A number as an exponent. */
export function raised(exponent: number): string {
  return [...String(exponent)].map((character) => RAISED[character]).join('')
}

/** A unit as one prints it: 'ng m-3' becomes 'ng m⁻³', 'um' becomes 'µm'. */
export function unitText(unit: string): string {
  return unit
    .split(' ')
    .map((part) => {
      const [, name, exponent] = /^(.*?)(-?\d+)?$/.exec(part) ?? [part, part]
      const printed = name.replace(/^u(?=[gm]$)/, 'µ')
      return exponent === undefined ? printed : `${printed}${raised(Number(exponent))}`
    })
    .join(' ')
}

/** What an axis says: a quantity and its unit. Pure numbers have none. */
export function quantityText(quantity: string, unit: string): string {
  return unit === '1' || unit === '' ? quantity : `${quantity}, ${unitText(unit)}`
}
