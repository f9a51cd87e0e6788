import { expect, test } from 'vitest'
import { countOf, type DeskItem, numbered, seenWith } from '../../web/features/desk/model/desk-items.ts'

const item = (id: string, cells: string[], open = true): DeskItem => ({
  id,
  number: 0,
  label: id,
  text: '',
  open,
  cells,
  more: 0,
  reading: null,
  doubt: { fingerprint: id, rule: 'Q12', severity: 'doubt', cells, text: '', settledBy: open ? null : 'Pell', why: null },
})

test('a doubt that a correction ended counts as settled, and the others keep their numbers', () => {
  const seen = seenWith([], [item('a', ['depth']), item('b', ['width'])])
  const left = [item('b', ['width'])]
  expect(countOf(left, seenWith(seen, left))).toEqual({ all: 2, settled: 1, open: 1 })
  expect(numbered(left, seen).map(({ number }) => number)).toEqual([2])
  expect(countOf([], seen)).toEqual({ all: 2, settled: 2, open: 0 })
})

test('a doubt that stays open about the same cells with other values is the same doubt', () => {
  const seen = seenWith([], [item('depth is 1', ['depth'])])
  const again = [item('depth is 2', ['depth'])]
  expect(countOf(again, seenWith(seen, again))).toEqual({ all: 1, settled: 0, open: 1 })
})

test('a doubt a person let stand counts as settled', () => {
  const items = [item('a', ['depth'], false)]
  expect(countOf(items, seenWith([], items))).toEqual({ all: 1, settled: 1, open: 0 })
})
