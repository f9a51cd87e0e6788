import { describe, expect, it } from 'vitest'
import { linkedGroups } from './linked.ts'
import { type Candidate, proposeDesign } from './propose-design.ts'

let last = 0
/** "A K1 Mon": a run of A on plot K1 on Monday; "-" where the plan does not tell. */
const runs = (...texts: string[]): Candidate[] =>
  texts.map((text) => {
    const [treatment = '', plot = '', day = ''] = text.split(' ')
    last += 1
    return {
      id: String(last),
      treatment,
      value: last,
      plot: plot === '-' ? null : `${plot} ${day}`,
      day: day === '-' ? null : day,
    }
  })
const propose = (...texts: string[]) => proposeDesign(runs(...texts), 'tractor')

describe('the design proposed', () => {
  it('is paired where both worked the same plots once each', () => {
    const { kind, block, why } = propose('A K1 Mon', 'B K1 Mon', 'A K2 Mon', 'B K2 Mon')
    expect([kind, block]).toEqual(['paired', 'plot'])
    expect(why).toBe('Both tractors worked the same 2 plots, once each: the gaps within plots are judged.')
  })

  it('leaves out of the pairs what had no partner, and says why', () => {
    const candidates = runs('A K1 Mon', 'B K1 Mon', 'A K2 Mon', 'B K2 Mon', 'B K3 Mon')
    const { kind, leftOut } = proposeDesign(candidates, 'tractor')
    expect(kind).toBe('paired')
    expect(leftOut).toEqual([{ id: candidates[4]!.id, reason: 'no other tractor worked its plot that day' }])
  })

  it.each([
    ['a plot was worked twice by one', ['A K1 Mon', 'A K1 Mon', 'B K1 Mon', 'A K2 Mon', 'B K2 Mon']],
    ['three tractors shared plots', ['A K1 Mon', 'B K1 Mon', 'C K1 Mon', 'A K2 Mon', 'B K2 Mon', 'C K2 Mon']],
  ])('is blocks of plots where %s', (_what, texts) => {
    const { kind, block } = propose(...texts)
    expect([kind, block]).toEqual(['blocks', 'plot'])
  })

  it('is blocks of days where each tractor kept its own plot', () => {
    const { kind, block, why } = propose('A K1 Mon', 'B K2 Mon', 'A K1 Tue', 'B K2 Tue', 'A - Wed', 'B - Wed')
    expect([kind, block]).toEqual(['blocks', 'day'])
    expect(why).toContain('3 days at one place were shared by both tractors')
  })

  it('says how many cells are empty', () => {
    const { why } = propose('A - Mon', 'B - Mon', 'B - Tue', 'C - Tue', 'A - Wed', 'C - Wed')
    expect(why).toContain('3 of their 9 cells are empty')
  })

  it('is unlike fields where nothing links all of them, and names who worked side by side', () => {
    const { kind, block, why, observations } = propose('A - Mon', 'B - Mon', 'C - Tue', 'D - Tue', 'A - Wed', 'B - Wed')
    expect([kind, block]).toEqual(['one factor', null])
    expect(why).toContain('Side by side worked: A and B; C and D.')
    expect(observations).toHaveLength(6)
  })

  it('is unlike fields where one day only was shared, or none', () => {
    expect(propose('A - Mon', 'B - Mon', 'A - Mon').why).toContain('shared one day only')
    expect(propose('A - Mon', 'B - Tue', 'A - -').why).toContain('did not share plots or days twice')
  })
})

describe('the warning beside the design', () => {
  const warned = (...texts: string[]) => propose(...texts).warning

  it('says that plot and tractor are mixed where only days were shared', () => {
    expect(warned('A K1 Mon', 'A K1 Mon', 'B K2 Mon', 'A K1 Tue', 'B K2 Tue')).toBe(
      'Plot and tractor are mixed: within a day the tractors did not share their plots, as far as the plans tell, and each run of a trial counts as a value of its own.',
    )
    expect(warned('A - Mon', 'B - Mon', 'A - Tue', 'B - Tue')).toContain('Plot and tractor are mixed')
  })

  it.each([
    ['blocks of plots', ['A K1 Mon', 'A K1 Mon', 'B K1 Mon', 'A K2 Mon', 'B K2 Mon']],
    ['unlike fields', ['A K1 Mon', 'A K1 Mon', 'B K2 Tue', 'B K3 Wed']],
  ])('says that runs of one trial lean on each other, in %s', (_what, texts) => {
    expect(warned(...texts)).toContain('Runs of one tractor on one plot lean on each other')
  })

  it('is not there where each run had its own plot, or a plot it shared once', () => {
    expect(warned('A K1 Mon', 'B K1 Mon', 'A K2 Mon', 'B K2 Mon')).toBeNull()
    expect(warned('A K1 Mon', 'B K1 Mon', 'A K2 Mon', 'B K2 Mon', 'B K3 Mon', 'B K3 Mon')).toBeNull()
    expect(warned('A K1 Mon', 'A K2 Tue', 'B - Wed')).toBeNull()
  })
})

describe('treatments linked through blocks', () => {
  it('are found through others', () => {
    const of = (...pairs: string[]) =>
      linkedGroups(pairs.map((pair) => ({ id: pair, treatment: pair[0]!, block: pair[1] ?? null, value: 0 })))
    expect(of('A1', 'B2', 'C1', 'C2')).toEqual([['A', 'C', 'B']])
    expect(of('A1', 'B1', 'C2', 'D2')).toEqual([
      ['A', 'B'],
      ['C', 'D'],
    ])
    expect(of('A', 'B')).toEqual([['A'], ['B']])
  })
})
