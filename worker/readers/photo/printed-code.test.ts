import { describe, expect, it } from 'vitest'
import { codeFromText } from './printed-code.ts'

// The codes are drawn at random; the texts are what tesseract.js 7 made of their print.
describe('the printed code of a sheet', () => {
  it.each([
    ['2H9R4 - QJJJ7 - H', '2H9R4QJJJ7H'],
    ['G34JG - B99ON - 0', 'G34JGB990NO'],
    ['X6842 - 6WCZQ - X', 'X684Z6WCZQX'],
    ['8BBQ8 - Y45SX- V', '8BBQ8Y45SX0'],
  ])('reads %s', (text, code) => {
    expect(codeFromText(text)).toBe(code)
  })

  it.each(['2H9R4QJJJ7H', '2H9R4-QJJJ7-Y', 'O6T1IH-TXMFO-1', ''])(
    'says nothing of %s, which is no code or has a letter too many',
    (text) => {
      expect(codeFromText(text)).toBeNull()
    },
  )
})
