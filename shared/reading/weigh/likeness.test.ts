import { describe, expect, it } from 'vitest'
import { box, comb, one, plain, weigh, written } from '../../../tests/builders/ink.ts'
import type { Tie } from '../../layouts/tie.ts'
import { BLANK } from '../classes.ts'
import { likeness } from './likeness.ts'

describe('likeness of repeats', () => {
  it('falls with the distance, either way, and never to nothing', () => {
    const weights = [15, 16, 18, 20, 90].map((value) => likeness(value, 15, { share: 0.3 }))
    expect(weights[0]).toBe(1)
    for (let i = 1; i < weights.length; i++) expect(weights[i]!).toBeLessThan(weights[i - 1]!)
    expect(weights.at(-1)!).toBeGreaterThan(0)
    expect(likeness(16, 15, { share: 0.3 })).toBe(likeness(15, 16, { share: 0.3 }))
  })
})

describe('a row of repeats', () => {
  const keys = ['d1', 'd2', 'd3', 'd4']
  const cells = keys.map((key) => comb(key, '99.9'))
  const ties: Tie[] = [{ kind: 'alike', keys, share: 0.3 }]
  const smudged = [box({ 1: 0.95, 7: 0.049 }), plain(5), plain(0)]
  const ink = { d1: written('150'), d2: written('145'), d3: smudged, d4: written('155') }

  it('settles a smudged one by the middle of the others', () => {
    expect(one(cells[2]!, smudged).state).toBe('in doubt')
    expect(weigh(cells, ties, ink).get('d3')).toMatchObject({ value: 15, state: 'clear' })
  })

  it('leaves a plain one alone that lies far from the others', () => {
    const read = weigh(cells, ties, { ...ink, d3: written('350') })
    expect(read.get('d3')).toMatchObject({ value: 35, state: 'clear' })
  })

  it('is not led by one odd reading among them', () => {
    const read = weigh(cells, ties, { ...ink, d1: written('750'), d2: written('145') })
    expect(read.get('d3')!.candidates[0]!.value).toBe(15)
  })

  it('says nothing where too few of the others are sure', () => {
    const unsure = [box({ 1: 0.5, 7: 0.49 }), plain(5), plain(0)]
    const alone = one(cells[2]!, smudged).posterior
    const read = weigh(cells, ties, { d1: unsure, d2: unsure, d3: smudged, d4: written('155') })
    expect(read.get('d3')!.posterior).toBeCloseTo(alone, 6)
  })
})

describe('a quotient', () => {
  it('settles a smudged number of passes by breadth and width, and never a plain one', () => {
    const cells = [comb('passes', '999'), comb('breadth', '999.9'), comb('width', '9.999')]
    const ties: Tie[] = [{ kind: 'quotient', key: 'passes', product: 'breadth', by: 'width', share: 0.1 }]
    const parts = { breadth: written(' 442'), width: written('0905') }
    const smudged = [plain(BLANK), box({ 4: 0.95, 9: 0.049 }), plain(9)]
    expect(one(cells[0]!, smudged).state).toBe('in doubt')
    expect(weigh(cells, ties, { ...parts, passes: smudged }).get('passes')).toMatchObject({ value: 49, state: 'clear' })
    expect(weigh(cells, ties, { ...parts, passes: written(' 99') }).get('passes')).toMatchObject({ value: 99, state: 'clear' })
  })
})
