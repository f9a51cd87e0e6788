import { describe, expect, it } from 'vitest'
import { box, comb, one, place, plain, rules, tick, time, weigh, written } from '../../../tests/builders/ink.ts'
import type { ChoiceCell } from '../../layouts/layout.ts'
import type { Tie } from '../../layouts/tie.ts'
import { BLANK, type TickDist } from '../classes.ts'

describe('clock and meters', () => {
  const keys = ['t_start', 'stop_from', 'stop_to', 't_end']
  const ties: Tie[] = [
    { kind: 'order', keys, usual_min: 180 },
    { kind: 'order', keys: ['t_start', 'jar_t', 't_end'], usual_min: 240 },
    { kind: 'not-less', less: 'h_start', greater: 'h_end', usual: 12 },
    { kind: 'elapsed', less: 'h_start', greater: 'h_end', start: 't_start', end: 't_end' },
  ]
  const cells = [...keys, 'jar_t'].map(time).concat([comb('h_start', '99999.9'), comb('h_end', '99999.9')])
  const ink = {
    t_start: written('0910'),
    stop_from: written('0938'),
    stop_to: written('0942'),
    t_end: written('1002'),
    jar_t: written('0912'),
    h_start: written(' 12345'),
    h_end: written(' 12354'),
  }

  it('keeps what fits clear although the ties close a ring', () => {
    const read = weigh(cells, ties, ink)
    expect([...read.values()].every((r) => r.state === 'clear')).toBe(true)
  })

  it('settles a smudged hour and a smudged meter by the clock', () => {
    const smudged = [box({ 0: 0.95, 2: 0.04 }), plain(9), plain(3), plain(8)]
    expect(one(time('stop_from'), [box({ 0: 0.95, 2: 0.04 }), plain(1), plain(3), plain(8)]).state).toBe('in doubt')
    const read = weigh(cells, ties, { ...ink, stop_from: smudged })
    expect(read.get('stop_from')).toMatchObject({ value: '09:38', state: 'clear' })
    const meter = [plain(BLANK), plain(1), plain(2), plain(3), plain(5), box({ 4: 0.97, 9: 0.0299 })]
    expect(one(comb('h_end', '99999.9'), meter).state).toBe('in doubt')
    expect(weigh(cells, ties, { ...ink, h_end: meter }).get('h_end')).toMatchObject({ value: 1235.4, state: 'clear' })
  })
})

describe('units and ticks', () => {
  const pressure = comb('p', '999', { scale: { by: 'unit', factors: { psi: 1, bar: 0.01 } } })
  const unit: ChoiceCell = {
    ...place,
    kind: 'choice',
    key: 'unit',
    label: 'unit',
    labelAt: 'none',
    options: ['psi', 'bar'].map((option) => ({ option, label: option, x: 0, y: 0 })),
  }
  const with_ = (ticks: TickDist[]) => weigh([pressure, unit], [], { p: written('190') }, { ticks: new Map([['unit', ticks]]) })

  it('scales digits by the ticked unit, and doubts them without one', () => {
    expect(with_([tick(1e-4), tick(0.9999)]).get('p')).toMatchObject({ value: 1.9, state: 'clear' })
    expect(rules(with_([tick(1e-4), tick(1e-4)]).get('p'))).toEqual(['Q16'])
  })

  it('doubts two ticks of one choice, and then the reading that needs the unit', () => {
    const read = with_([tick(0.9999), tick(0.9999)])
    expect(rules(read.get('unit'))).toEqual(['R06'])
    expect(rules(read.get('p'))).toContain('Q16')
  })
})
