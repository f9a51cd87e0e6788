import fc from 'fast-check'
import Papa from 'papaparse'
import { expect, it } from 'vitest'
import { csvLine, dataLine, safeText } from './csv-text.ts'

/** What starts a formula in a spreadsheet program, after blanks (OWASP ASVS 5.0, 1.2.10). */
const RUNS = /^[\s\uFEFF]*[=+\-@|]/

const cell = fc.oneof(
  fc.string({ unit: 'binary' }),
  fc.string({ unit: fc.constantFrom('=', '+', '-', '@', '\t', '\r', '\n', '"', ',', ' ', '\uFEFF', '|', "'", 'a', '1') }),
  fc.double({ noNaN: true, noDefaultInfinity: true }),
  fc.boolean(),
  fc.constant(null),
)

it('a line reads back as it was: numbers to the last digit, text with at most an apostrophe in front, nothing that runs', () => {
  fc.assert(
    fc.property(fc.array(cell, { minLength: 1, maxLength: 12 }), (line) => {
      // A byte order mark is taken off the front of a file only.
      const [[, ...read] = []] = Papa.parse<string[]>(dataLine(['front', ...line]), { delimiter: ',', newline: '\r\n' }).data
      line.forEach((value, i) => {
        const text = read[i] ?? ''
        if (value === null) expect(text).toBe('')
        else if (typeof value === 'number') expect(Number(text)).toBe(value === 0 ? 0 : value)
        else if (typeof value === 'boolean') expect(text).toBe(String(value))
        else {
          expect(text).not.toMatch(RUNS)
          expect([value, `'${value}`]).toContain(text)
        }
      })
    }),
    { numRuns: 1_000 },
  )
})

it('a negative number stays a number', () => {
  expect(dataLine([-1.5, '-1.5', 'left - right'])).toBe("-1.5,'-1.5,left - right\r\n")
  expect(safeText('12-A')).toBe('12-A')
})

it('quotes what would end a field or a line', () => {
  expect(csvLine(['a"b', 'c,d', 'e\nf', 'g'])).toBe('"a""b","c,d","e\nf",g\r\n')
})
