/** Figures as one says them: "fourteen point one". */

const ONES = [
  'nought',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
  'thirteen',
  'fourteen',
  'fifteen',
  'sixteen',
  'seventeen',
  'eighteen',
  'nineteen',
] as const
const TENS = ['', '', 'twenty', 'thirty', 'forty', 'fifty', 'sixty', 'seventy', 'eighty', 'ninety'] as const

/** A figure as it is written ("14.1", "0.07", "2700") in words; digits after the point one by one. @throws RangeError for anything else */
export function spoken(figure: string): string {
  const parts = /^(-?)(\d{1,6})(?:\.(\d+))?$/.exec(figure)
  if (!parts) throw new RangeError(`${figure} is no figure to say`)
  const [, minus, whole = '', decimals] = parts
  const point = decimals ? ` point ${[...decimals].map((d) => ONES[Number(d)]).join(' ')}` : ''
  return `${minus ? 'minus ' : ''}${wholeWords(Number(whole))}${point}`
}

function wholeWords(n: number): string {
  if (n < 20) return ONES[n] ?? ''
  if (n < 100) return `${TENS[Math.floor(n / 10)]}${n % 10 ? `-${ONES[n % 10]}` : ''}`
  const [size, word] = n < 1000 ? [100, 'hundred'] : [1000, 'thousand']
  const rest = n % size
  return `${wholeWords(Math.floor(n / size))} ${word}${rest === 0 ? '' : `${rest < 100 ? ' and' : ''} ${wholeWords(rest)}`}`
}
