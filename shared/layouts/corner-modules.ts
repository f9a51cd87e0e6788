/** The dark and light modules of a corner code: what is printed, and what the reader correlates with. */
import encodeQR from 'qr'
import { type CornerCode, cornerCodeText } from './sheet-code.ts'

/** 21 x 21 modules (ISO/IEC 18004 version 1, level Q, alphanumeric), true = dark, without the quiet zone. */
export function cornerModules(code: CornerCode): boolean[][] {
  const bordered = encodeQR(cornerCodeText(code), 'raw', { ecc: 'quartile', version: 1, encoding: 'alphanumeric', border: 1 })
  return bordered.slice(1, -1).map((row) => row.slice(1, -1))
}
