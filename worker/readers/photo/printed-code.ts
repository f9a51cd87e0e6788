/** A sheet's code from what the text engine made of its printed letters. */
import { CODE_ALPHABET, checkCharacter, parseSheetCode } from '../../../shared/layouts/sheet-code.ts'

/** What the engine takes for what, seen on 40 printed codes: zeros are slashed, and O, I, L and U stand in no code's body. */
const MEANT: Readonly<Record<string, string>> = {
  O: '0',
  I: '1',
  L: '1',
  U: 'V',
  B: '68',
  '8': 'B0',
  '6': 'GB',
  G: '6',
  S: '5',
  '5': 'S',
  Z: '2',
  '2': 'Z',
  Q: '0',
  D: '0',
  V: '0',
  '0': 'QO',
  '1': 'I',
  '7': '1',
}

const BODY = 10

/**
 * The code, or null. Letters that look alike are exchanged, at most one in the body besides those that no body holds, and only
 * where a single exchange makes the check character agree.
 */
export function codeFromText(text: string): string | null {
  const seen = /^([0-9A-Z]{5})-([0-9A-Z]{5})-([0-9A-Z])$/.exec(text.toUpperCase().replace(/\s/g, ''))
  if (!seen) return null
  const plain = parseSheetCode(seen.slice(1).join(''))
  if (plain && isBody(plain.slice(0, BODY))) return plain
  const body = [...`${seen[1]}${seen[2]}`].map((c) => (CODE_ALPHABET.includes(c) ? c : MEANT[c]![0]!))
  const own = body.join('')
  if (looksLike(seen[3]!, checkCharacter(own))) return own + checkCharacter(own)
  const agreeing = exchanged(body)
    .map((letters) => letters.join(''))
    .filter((letters) => checkCharacter(letters) === seen[3])
  return agreeing.length === 1 ? agreeing[0]! + seen[3]! : null
}

const isBody = (text: string) => [...text].every((c) => CODE_ALPHABET.includes(c))

function exchanged(body: readonly string[]): string[][] {
  return body.flatMap((letter, i) =>
    [...(MEANT[letter] ?? '')].filter((other) => CODE_ALPHABET.includes(other)).map((other) => body.with(i, other)),
  )
}

const looksLike = (seen: string, meant: string) => seen === meant || (MEANT[seen] ?? '').includes(meant)
