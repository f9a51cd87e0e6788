import { expect, test } from 'vitest'
import { cornersMissing } from './take-again.ts'

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
