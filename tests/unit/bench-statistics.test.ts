import { expect, test } from 'vitest'
import { bootstrapBySheet, exactInterval, quantile } from '../bench/statistics.ts'

// NIST/SEMATECH e-Handbook of Statistical Methods, 7.2.4.2: 4 defectives of 20, 90 % two-sided exact interval.
test('the exact interval of 4 of 20 at 90 % is the published one', () => {
  const { low, high } = exactInterval(4, 20, 0.9)
  expect(low).toBeCloseTo(0.0713539, 7)
  expect(high).toBeCloseTo(0.4010281, 7)
})

// Closed form where nothing was hit: high = 1 - (tail)^(1/n).
test('none of n is bounded from above only', () => {
  const { low, high } = exactInterval(0, 300)
  expect(low).toBe(0)
  expect(high).toBeCloseTo(1 - 0.025 ** (1 / 300), 12)
})

test('all of n mirrors none of n', () => {
  const all = exactInterval(50, 50)
  const none = exactInterval(0, 50)
  expect(all.low).toBeCloseTo(1 - none.high, 12)
  expect(all.high).toBe(1)
})

test('a bootstrap by sheet is wider than the exact interval when the errors stand on one sheet', () => {
  const sheets = Array.from({ length: 20 }, (_, i) => [i === 0 ? 20 : 0, 50] as const)
  const drawn = bootstrapBySheet(sheets)
  const exact = exactInterval(20, 1000)
  expect(drawn.low).toBe(0)
  expect(drawn.high).toBeGreaterThan(exact.high)
})

test('sheets that are all alike leave the bootstrap no width', () => {
  const { low, high } = bootstrapBySheet(Array.from({ length: 10 }, () => [3, 60] as const))
  expect(low).toBeCloseTo(0.05, 12)
  expect(high).toBeCloseTo(0.05, 12)
})

test('a quantile lies between its neighbours in proportion', () => {
  expect(quantile([1, 2, 4, 8], 0.5)).toBe(3)
})
