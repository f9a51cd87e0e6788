import { expect, test } from 'vitest'
import { coveredPlace } from './covered-place.ts'

const page = { width: 210, height: 297 }
/** Fields every 15 mm over the whole page; those that `isLost` names were not found. */
const fields = (isLost: (x: number, y: number) => boolean) =>
  Array.from({ length: 13 * 19 }, (_, i) => {
    const center = { x: 12 + 15 * (i % 13), y: 12 + 15 * Math.floor(i / 13) }
    return { center, found: !isLost(center.x, center.y) }
  })

test('fields lost under a finger are a place on the page', () => {
  const place = coveredPlace(
    fields((x, y) => x > 150 && y > 200 && y < 260),
    page,
  )
  expect(place!.across).toBeGreaterThan(2 / 3)
  expect(place!.down).toBeGreaterThan(2 / 3)
})

test('one more field lost far away does not hide it', () => {
  const lost = fields((x, y) => (x < 60 && y < 100) || (x > 190 && y > 280))
  expect(coveredPlace(lost, page)).toMatchObject({ across: expect.closeTo(0.17, 1) })
})

test('fields lost here and there are none', () => {
  expect(
    coveredPlace(
      fields((x, y) => (x + 2 * y) % 5 === 0),
      page,
    ),
  ).toBeNull()
})

test('a page of which nothing is lost has none', () =>
  expect(
    coveredPlace(
      fields(() => false),
      page,
    ),
  ).toBeNull())
