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

// A hybrid system such as MOD 37,36 misses a few swaps: 1.4 in a thousand by counting 170,000 of them.
test('two neighbours swapped are noticed all but twice in a thousand', () => {
  const swaps = fc
    .sample(code, { numRuns: 2_000, seed: 7064 })
    .flatMap((good) => Array.from({ length: 9 }, (_, at) => [good, at] as const))
    .filter(([good, at]) => good[at] !== good[at + 1])
  const missed = swaps.filter(([good, at]) =>
    parseSheetCode(`${good.slice(0, at)}${good[at + 1]}${good[at]}${good.slice(at + 2)}`),
  )
  expect(missed.length / swaps.length).toBeLessThan(0.002)
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
