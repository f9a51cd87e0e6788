/**
 * Sheet codes: ten characters and an ISO/IEC 7064 check character (MOD 37,36), so that one mistyped character or one swap of
 * neighbours is noticed. The printed alphabet leaves out I, L, O and U, which hands confuse with 1, 0 and V.
 */
const DIGITS = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ'
export const CODE_ALPHABET = '0123456789ABCDEFGHJKMNPQRSTVWXYZ'
const CODE_LENGTH = 10

/** ISO/IEC 7064 MOD 37,36 (hybrid system) check character of an upper-case alphanumeric text. */
export function checkCharacter(text: string): string {
  let carry = 36
  for (const character of text) {
    const value = DIGITS.indexOf(character)
    if (value < 0) throw new RangeError(`"${character}" is not in 0-9, A-Z`)
    carry = (carry + value) % 36 || 36
    carry = (carry * 2) % 37
  }
  return DIGITS[(37 - carry) % 36]!
}

/** Ten random characters (`random(n)`: a whole number from 0 to n - 1) and their check. */
export function makeSheetCode(random: (below: number) => number): string {
  const body = Array.from({ length: CODE_LENGTH }, () => CODE_ALPHABET[random(CODE_ALPHABET.length)]).join('')
  return body + checkCharacter(body)
}

/** The code without spaces and hyphens, in capitals, or null when its length, characters or check are wrong. */
export function parseSheetCode(written: string): string | null {
  const code = written.toUpperCase().replace(/[\s-]/g, '')
  if (!/^[0-9A-Z]{11}$/.test(code)) return null
  return checkCharacter(code.slice(0, CODE_LENGTH)) === code[CODE_LENGTH] ? code : null
}

/** As printed and spoken: 7K4QM-2K9TA-X. */
export const formatSheetCode = (code: string) => `${code.slice(0, 5)}-${code.slice(5, 10)}-${code.slice(10)}`

export interface CornerCode {
  layoutCode: string
  version: number
  /** Clockwise from the top left: 0 to 3. */
  corner: number
  /** true: what the plan knows is printed, and the head has no boxes. */
  planned: boolean
  sheetCode: string
}

/** The 16 characters of a corner code: layout 2, version 2, corner 1, sheet code 10, its check 1. */
export const cornerCodeText = (c: CornerCode) =>
  `${c.layoutCode}${String(c.version).padStart(2, '0')}${c.corner + (c.planned ? 5 : 1)}${c.sheetCode}`

/** Reads a corner code back, or null for any other text. */
export function parseCornerCode(text: string): CornerCode | null {
  const match = /^([A-Z]{2})(\d{2})([1-8])([0-9A-Z]{11})$/.exec(text)
  const sheetCode = match && parseSheetCode(match[4]!)
  if (!match || !sheetCode) return null
  const mark = Number(match[3]) - 1
  return { layoutCode: match[1]!, version: Number(match[2]), corner: mark % 4, planned: mark > 3, sheetCode }
}
