/** A number that somebody typed as text: taken when it can mean one thing only. */
import type { DecimalMark } from '../../../shared/layouts/form.ts'

export type NumberText =
  | { kind: 'number'; number: number }
  /** It means different numbers to different people; both are offered, none is taken. */
  | { kind: 'ambiguous'; numbers: number[] }
  | { kind: 'not a number' }

/**
 * Reads `text` under the decimal mark the form's head declares. The other mark is never guessed to be a mere grouping sign:
 * 1,234 is a thousand to some and one and a bit to others.
 */
export function readNumber(text: string, mark: DecimalMark): NumberText {
  // Spaces, thin and no-break ones too, only ever group thousands.
  const written = text
    .trim()
    .replace(/(?<=\d)[\s\u00a0\u2009\u202f](?=\d{3}(?!\d))/g, '')
    .replace(/^[\u2212\u2013](?=\d)/, '-')
  const other = mark === '.' ? ',' : '.'
  if (isPlain(written, mark)) return { kind: 'number', number: toNumber(written, mark) }
  const asDecimal = isPlain(written, other) ? [toNumber(written, other)] : []
  const ungrouped = new RegExp(`^-?\\d{1,3}(\\${other}\\d{3})+(\\${mark}\\d+)?$`).test(written)
  const asGroups = ungrouped ? [toNumber(written.replaceAll(other, ''), mark)] : []
  const numbers = [...asDecimal, ...asGroups]
  return numbers.length > 0 ? { kind: 'ambiguous', numbers } : { kind: 'not a number' }
}

const isPlain = (text: string, mark: DecimalMark | ',' | '.') =>
  new RegExp(`^[-+]?(\\d+(\\${mark}\\d*)?|\\${mark}\\d+)$`).test(text)

const toNumber = (text: string, mark: string) => Number(text.replace(mark, '.'))
