import fc from 'fast-check'
import { expect, test } from 'vitest'
import { CODE_ALPHABET, checkCharacter, cornerCodeText, makeSheetCode, parseCornerCode, parseSheetCode } from './sheet-code.ts'

test('the check character agrees with a published ISO/IEC 7064 MOD 37,36 example', () => {
  // The Global Release Identifier standard (IFPI) gives A1-2425GABC1234002-M as its example; its check is MOD 37,36. From memory.
  expect(checkCharacter('A12425GABC1234002')).toBe('M')
})

const code = fc.array(fc.integer({ min: 0, max: CODE_ALPHABET.length - 1 }), { minLength: 10, maxLength: 10 }).map((digits) => {
  const left = [...digits]
  return makeSheetCode(() => left.shift() ?? 0)
})

test('one character mistaken is always noticed', () => {
  fc.assert(
    fc.property(
      code,
      fc.integer({ min: 0, max: 10 }),
      fc.constantFrom(...'0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ'),
      (good, at, other) => {
        fc.pre(good[at] !== other)
        expect(parseSheetCode(good.slice(0, at) + other + good.slice(at + 1))).toBeNull()
      },
    ),
  )
})

test('two neighbours swapped are always noticed', () => {
  fc.assert(
    fc.property(code, fc.integer({ min: 0, max: 8 }), (good, at) => {
      fc.pre(good[at] !== good[at + 1])
      const swapped = good.slice(0, at) + good[at + 1] + good[at] + good.slice(at + 2)
      expect(parseSheetCode(swapped)).toBeNull()
    }),
  )
})

test('a corner code says layout, version, corner and whether the plan is printed, in 16 characters', () => {
  fc.assert(
    fc.property(code, fc.integer({ min: 0, max: 3 }), fc.boolean(), (sheetCode, corner, planned) => {
      const corners = { layoutCode: 'TI', version: 1, corner, planned, sheetCode }
      const text = cornerCodeText(corners)
      expect(text).toHaveLength(16)
      expect(parseCornerCode(text)).toEqual(corners)
    }),
  )
})

test('spaces, hyphens and small letters do not matter', () => {
  const good = makeSheetCode(() => 7)
  expect(parseSheetCode(` ${good.slice(0, 5).toLowerCase()}-${good.slice(5)} `)).toBe(good)
})
