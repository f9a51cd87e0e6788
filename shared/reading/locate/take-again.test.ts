import { expect, test } from 'vitest'
import { cornersMissing, covered, shortReasonOf, TAKE_AGAIN_CODES, takeAgain } from './take-again.ts'

test('a corner outside the picture is named, with the way to move', () => {
  expect(cornersMissing([3], true)).toEqual({
    code: 'corner missing',
    advice: 'The lower left corner is outside the picture. Move the phone a hand to the left, or a little higher.',
  })
  expect(cornersMissing([0, 1], true).advice).toMatch(/upper left and upper right corners are .* towards the top/)
})

test('a corner inside the picture that cannot be read is covered', () => {
  expect(cornersMissing([1], false).advice).toMatch(/^The upper right corner cannot be read\. Keep fingers/)
})

test('a covered part is named by where it lies', () => {
  expect(covered(0.9, 0.5).advice).toMatch(/^The printed boxes at the right of the sheet are covered/)
  expect(covered(0.1, 0.95).advice).toMatch(/at the lower left of the sheet/)
  expect(covered(0.5, 0.1).advice).toMatch(/at the top of the sheet/)
})

test('every code has its short reason for a clerk', () => {
  for (const code of TAKE_AGAIN_CODES) expect(shortReasonOf(code), code).toMatch(/^[a-z].*[a-z]$/)
})

test('advice says what is wrong, then what to do', () => {
  for (const code of TAKE_AGAIN_CODES) {
    if (code === 'corner missing' || code === 'covered') continue
    expect(takeAgain(code).advice, code).toMatch(/^[A-Z].*\. [A-Z].*\.$/)
  }
})
