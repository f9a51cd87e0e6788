import { expect, test } from 'vitest'
import { whiten } from './whiten.ts'

/** Bluish paper with a tenth of it blue ink. */
function page(): Uint8Array {
  const dots = Array.from({ length: 1000 }, (_, i) => (i % 10 === 0 ? [30, 40, 120] : [120, 150, 200]))
  return Uint8Array.from(dots.flat())
}

test('paper comes out alike in all channels, and ink stays darker and of its colour', () => {
  const data = page()
  whiten(data, 3)
  const paper = [...data.slice(3, 6)]
  const ink = [...data.slice(0, 3)]
  expect(Math.max(...paper) - Math.min(...paper)).toBeLessThanOrEqual(2)
  expect(paper[0]).toBeGreaterThan(230)
  expect(Math.max(...ink)).toBeLessThan(160)
  expect(ink[2]).toBeGreaterThan(ink[0]!)
})

test('a picture in the dark is lifted only so far', () => {
  const data = new Uint8Array(300).fill(20)
  whiten(data, 3)
  expect(data[0]).toBe(48)
})
