/** Numbers and lists as the sentences of the rules say them. */

/** At most `decimals` decimals, without trailing zeros; no digits are added. */
export const figure = (value: number, decimals = 2): string => String(Number(value.toFixed(decimals)) || 0).replace('-', '−')

/** Three figures, or as many as asked for, whatever the size. */
export function rough(value: number, figures = 3): string {
  if (value === 0) return '0'
  const decimals = Math.max(0, figures - 1 - Math.floor(Math.log10(Math.abs(value))))
  return figure(value, Math.min(6, decimals))
}

/** "1, 2 and 3". */
export function listed(items: readonly (string | number)[]): string {
  if (items.length < 2) return items.join('')
  return `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`
}

/** The first letter small, for a label inside a sentence. */
export const inside = (label: string): string =>
  /^[A-Z][a-z]/.test(label) ? label.charAt(0).toLowerCase() + label.slice(1) : label

/** The first letter large, for a label that begins a sentence. */
export const leading = (label: string): string => label.charAt(0).toUpperCase() + label.slice(1)

/** Numbers of repeated cells: "2 and 7", "1 to 10". */
export function numbersListed(numbers: readonly number[]): string {
  const [first, last] = [numbers[0], numbers.at(-1)]
  const inRow = first !== undefined && last !== undefined && numbers.length > 2 && last - first === numbers.length - 1
  return inRow ? `${first} to ${last}` : listed(numbers)
}

/** A label with its value; brackets keep "Depth 4" and "19 cm" apart. */
export const valued = (label: string, value: string): string => (/\d$/.test(label) ? `${label} (${value})` : `${label} ${value}`)
