import { expect, test } from 'vitest'
import { agreeing, type LineEnd } from './line-ends.ts'

const end = (x: number, off_mm: number): LineEnd => ({
  mark: { key: 'end', x, y: 287, dx: 2 + off_mm, dy: 0, weight: 1 },
  off_mm,
})
const kept = (...ends: LineEnd[]) => agreeing(ends).map(({ x }) => x)

test('the tail of a signature is refused where the ends beside it agree on another place', () => {
  expect(kept(end(31, 0.1), end(66, 0), end(69, -1.2), end(104, 0.1))).toEqual([31, 66, 104])
})

test('ends that are off together are believed: the page bends there', () => {
  expect(kept(end(31, 0.9), end(66, 1.1), end(69, 1), end(104, 1.2))).toEqual([31, 66, 69, 104])
})

test('an end with no others to ask is believed only near where the fields around put it', () => {
  expect(kept(end(31, 0.3))).toEqual([31])
  expect(kept(end(31, 0.9), end(66, -0.2))).toEqual([66])
})
