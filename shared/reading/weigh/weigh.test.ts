import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { ChoiceCell, CombCell } from '../../layouts/layout.ts'
import { ACRE_M2, HECTARE_M2, type Tie } from '../../layouts/tie.ts'
import { BLANK, CLASS_COUNT, type TickDist, VOID } from '../classes.ts'
import { type SheetInk, weighSheet } from './sheet.ts'
import type { Facts, Weighed } from './types.ts'

const place = { x: 0, y: 0, section: 1, need: 'mandatory' as const }
const comb = (key: string, format: string, more: Partial<CombCell> = {}): CombCell => ({
  ...place,
  kind: 'digits',
  key,
  label: key,
  format,
  unit: null,
  ...more,
})
const time = (key: string): CombCell => comb(key, '99:99', { kind: 'time' })

/** A box by its likely classes; the rest is spread thinly over the others. */
function box(shares: Record<number, number>): number[] {
  const named = Object.values(shares).reduce((a, b) => a + b, 0)
  const rest = (1 - named) / (CLASS_COUNT - Object.keys(shares).length)
  return Array.from({ length: CLASS_COUNT }, (_, k) => shares[k] ?? rest)
}
const plain = (k: number) => box({ [k]: 0.9999 })
/** '  80' with blanks, 'x' for a spoiled box. */
const written = (text: string) => [...text].map((c) => plain(c === ' ' ? BLANK : c === 'x' ? VOID : Number(c)))

const tick = (p: number): TickDist => ({ ticked: p, empty: 1 - p - 1e-5, spoiled: 1e-5 })

function weigh(
  cells: Array<CombCell | ChoiceCell>,
  ties: Tie[],
  combs: Record<string, number[][]>,
  more: { ticks?: SheetInk['ticks']; facts?: Facts } = {},
) {
  return weighSheet({ cells, ties }, { combs: new Map(Object.entries(combs)), ticks: more.ticks ?? new Map() }, more.facts)
}
const one = (cell: CombCell, boxes: number[][], ties: Tie[] = [], facts?: Facts): Weighed =>
  weigh([cell], ties, { [cell.key]: boxes }, { facts }).get(cell.key)!
const rules = (reading: Weighed | undefined) => reading?.reasons.map((r) => r.rule)

describe('one reading', () => {
  it('takes right-aligned digits with leading blanks or zeros as the same number', () => {
    expect(one(comb('a', '9999'), written(' 480'))).toMatchObject({ value: 480, state: 'clear' })
    expect(one(comb('a', '9999'), written('0480'))).toMatchObject({ value: 480, state: 'clear' })
    expect(one(comb('a', '99.9'), written(' 95'))).toMatchObject({ value: 9.5, state: 'clear' })
    expect(one(comb('a', '99.999'), written('  270'))).toMatchObject({ value: 0.27 })
  })

  it('adds up the ink of both ways to write the same number', () => {
    const either = [box({ [BLANK]: 0.5, 0: 0.4999 }), plain(4), plain(8), plain(0)]
    expect(one(comb('a', '9999'), either)).toMatchObject({ value: 480, state: 'clear' })
  })

  it('reads an empty comb as blank', () => {
    expect(one(comb('a', '9999'), written('    '))).toMatchObject({ value: null, state: 'clear' })
  })

  it('doubts a gap between digits and an empty decimal box', () => {
    expect(rules(one(comb('a', '9999'), written('4 80')))).toContain('Q55')
    expect(rules(one(comb('a', '99.9'), written('15 ')))).toContain('Q55')
  })

  it('doubts a crossed-out box', () => {
    const reading = one(comb('a', '9999'), written('48x0'))
    expect(reading.state).toBe('in doubt')
    expect(rules(reading)).toContain('R01')
  })

  it('knows clock and calendar', () => {
    expect(one(time('t'), written('0910'))).toMatchObject({ value: '09:10', state: 'clear' })
    expect(one(time('t'), written(' 910'))).toMatchObject({ value: '09:10', state: 'clear' })
    expect(one(time('t'), written('2910')).state).toBe('in doubt')
    const date = comb('d', '99-99-9999', { kind: 'date' })
    expect(one(date, written('13102026'))).toMatchObject({ value: '2026-10-13', state: 'clear' })
    expect(one(date, written('31022026')).state).toBe('in doubt')
    expect(one(date, written('14102026'), [], { today: '2026-10-13' }).state).toBe('in doubt')
  })

  it('chooses by the clock between two digits that the ink allows', () => {
    // 27:10 is no time, so the second digit is the 1 that the ink holds likely as well.
    expect(one(time('t'), [plain(2), box({ 7: 0.4, 1: 0.5999 }), plain(1), plain(0)])).toMatchObject({
      value: '21:10',
      state: 'clear',
    })
  })

  it('leans on the marks of an instrument, and leaves a broken mark to a person', () => {
    const marks: Tie[] = [{ kind: 'marks', keys: ['jar'], step: 200, half: 100 }]
    const jar = comb('jar', '9999')
    const smudged = [plain(4), plain(8), box({ 0: 0.98, 6: 0.0199 }), plain(0)]
    expect(one(jar, smudged).state).toBe('in doubt')
    expect(one(jar, smudged, marks)).toMatchObject({ value: 4800, state: 'clear' })
    expect(one(jar, written('4810'), marks)).toMatchObject({ value: 4810, state: 'in doubt' })
  })

  it('prefers numbers that the register holds, without inventing ink', () => {
    const cell = comb('kit', '9999', { register: 'kits' })
    const facts = { known: { kits: new Set([31, 37, 112]) } }
    const smudged = [plain(0), plain(0), plain(3), box({ 7: 0.97, 9: 0.0299 })]
    expect(one(cell, smudged).state).toBe('in doubt')
    expect(one(cell, smudged, [], facts)).toMatchObject({ value: 37, state: 'clear' })
    expect(one(cell, written('0039'), [], facts)).toMatchObject({ value: 39 })
  })

  it('puts every comb whose boxes are unsure in doubt, whatever the digits', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 0, max: 9 }), { minLength: 4, maxLength: 4 }),
        fc.nat(3),
        fc.double({ min: 0.3, max: 0.95, noNaN: true }),
        (digits, at, p) => {
          const boxes = digits.map((d, i) => (i === at ? box({ [d]: p, [(d + 1) % 10]: 1 - p - 0.001 }) : plain(d)))
          const reading = one(comb('a', '9999'), boxes)
          expect(reading.state).toBe('in doubt')
          expect(reading.candidates.length).toBeGreaterThan(1)
        },
      ),
      { numRuns: 100 },
    )
  })
})

const FUEL: Tie = { kind: 'balance', plus: ['start', 'topup'], minus: ['end'], equals: 'used' }
const fuelCells = [
  comb('start', '9999'),
  comb('topup', '9999', { need: 'conditional' }),
  comb('end', '9999'),
  comb('used', '9999'),
]
const pad = (n: number) => String(n).padStart(4, ' ')

describe('the fuel balance', () => {
  const two = [box({ 2: 0.9999 }), box({ 6: 0.63, 0: 0.34 }), plain(0), plain(0)]

  it('lists both values and takes neither where the ink favours 2600 and the sum 2000', () => {
    const read = weigh(fuelCells, [FUEL], { start: written('4800'), topup: written('1000'), end: two, used: written('3800') })
    const end = read.get('end')!
    expect(end.state).toBe('in doubt')
    expect(rules(end)).toContain('R03')
    expect(end.candidates[0]).toMatchObject({ value: 2000 })
    expect(end.candidates[0]!.p).toBeGreaterThan(0.95)
    expect(end.candidates[0]!.ink).toBeCloseTo(0.34, 1)
    expect(end.candidates[1]).toMatchObject({ value: 2600 })
    expect(end.candidates[1]!.ink).toBeCloseTo(0.63, 1)
  })

  it('makes a reading clear that the ink alone leaves in doubt, where the sum agrees with the ink', () => {
    const likely = [plain(2), box({ 0: 0.9, 6: 0.09 }), plain(0), plain(0)]
    expect(one(comb('end', '9999'), likely).state).toBe('in doubt')
    const read = weigh(fuelCells, [FUEL], { start: written('4800'), topup: written('1000'), end: likely, used: written('3800') })
    for (const key of ['start', 'topup', 'end', 'used']) expect(read.get(key)!.state).toBe('clear')
  })

  it('counts a blank top-up as nothing', () => {
    const read = weigh(fuelCells, [FUEL], {
      start: written('4800'),
      topup: written('    '),
      end: written('2000'),
      used: written('2800'),
    })
    expect([...read.values()].map((r) => [r.value, r.state])).toEqual([
      [4800, 'clear'],
      [null, 'clear'],
      [2000, 'clear'],
      [2800, 'clear'],
    ])
  })

  it('reports any wrong sum of plainly written numbers and changes none of them', () => {
    const hundreds = fc.integer({ min: 5, max: 45 }).map((n) => n * 100)
    fc.assert(
      fc.property(
        hundreds,
        fc.integer({ min: 0, max: 9 }),
        hundreds,
        fc.integer({ min: 1, max: 40 }),
        (start, topup, end, slip) => {
          const right = start + topup * 100 - end
          const used = right + slip * 100
          fc.pre(right > 0 && used < 9999)
          const read = weigh(fuelCells, [FUEL], {
            start: written(pad(start)),
            topup: written(pad(topup * 100)),
            end: written(pad(end)),
            used: written(pad(used)),
          })
          expect(read.get('used')).toMatchObject({ value: used, state: 'in doubt' })
          expect(read.get('used')!.reasons[0]).toMatchObject({ rule: 'R04', cells: ['start', 'topup', 'end', 'used'] })
          expect(read.get('start')!.value).toBe(start)
          expect(read.get('end')!.value).toBe(end)
        },
      ),
      { numRuns: 60 },
    )
  })

  it('never makes clear a value that the ink ranks second, whatever the sum says', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 9 }),
        fc.integer({ min: 0, max: 9 }),
        fc.double({ min: 0.5, max: 0.98, noNaN: true }),
        (inked, summed, p) => {
          fc.pre(inked !== summed)
          const end = [plain(2), box({ [inked]: p, [summed]: 0.99 - p > 0 ? 0.99 - p : 0.005 }), plain(0), plain(0)]
          const used = 4800 - (2000 + summed * 100)
          const read = weigh(fuelCells, [FUEL], { start: written('4800'), topup: written('    '), end, used: written(pad(used)) })
          const reading = read.get('end')!
          if (reading.state === 'clear') expect(reading.value).toBe(2000 + inked * 100)
        },
      ),
      { numRuns: 100 },
    )
  })
})

describe('means by hand', () => {
  const depths = [14.5, 15, 15.5, 14, 16, 15, 14.5, 15.5, 16.5, 15] // golden sheet, first ten: mean 15.15
  const cells = [...depths.map((_, i) => comb(`depth[${i + 1}]`, '99.9')), comb('mean', '99.9')]
  const tie: Tie = { kind: 'mean', of: depths.map((_, i) => `depth[${i + 1}]`), equals: 'mean' }
  const tenths = (x: number) => written(String(Math.round(x * 10)).padStart(3, ' '))
  const ink = Object.fromEntries(depths.map((d, i) => [`depth[${i + 1}]`, tenths(d)]))

  it('holds at the written place, both ways at a half', () => {
    for (const mean of [15.1, 15.2]) {
      const read = weigh(cells, [tie], { ...ink, mean: tenths(mean) })
      expect(read.get('mean')).toMatchObject({ value: mean, state: 'clear' })
    }
    const read = weigh(cells, [tie], { ...ink, mean: tenths(15.4) })
    expect(rules(read.get('mean'))).toEqual(['R04'])
  })

  it('leaves blanks out of the mean', () => {
    const read = weigh(cells, [tie], { ...ink, 'depth[9]': written('   '), mean: tenths(15) })
    expect(read.get('mean')).toMatchObject({ value: 15, state: 'clear' })
  })

  it('settles one smudged depth by the mean of ten', () => {
    const smudged = [plain(1), box({ 6: 0.7, 0: 0.29 }), plain(0)]
    expect(one(comb('depth[5]', '99.9'), smudged).state).toBe('in doubt')
    const read = weigh(cells, [tie], { ...ink, 'depth[5]': smudged, mean: tenths(15.2) })
    expect(read.get('depth[5]')).toMatchObject({ value: 16, state: 'clear' })
  })
})

describe('area and rate by hand', () => {
  const sides = ['ab', 'bc', 'cd', 'da'] as const
  const squareMetres = { ha: HECTARE_M2, acre: ACRE_M2 }
  const cells: Array<CombCell | ChoiceCell> = [
    ...[...sides, 'ac'].map((key) => comb(key, '999.9', { need: 'conditional' })),
    comb('area', '99.999'),
    comb('used', '9999'),
    comb('rate', '99.99'),
    {
      ...place,
      kind: 'choice',
      key: 'unit',
      label: 'unit',
      labelAt: 'none',
      options: ['ha', 'acre'].map((option) => ({ option, label: option, x: 0, y: 0 })),
    },
  ]
  const ties: Tie[] = [
    { kind: 'area', sides: [...sides], diagonal: 'ac', unit: 'unit', squareMetres, equals: 'area' },
    { kind: 'rate', amount: 'used', factor: 0.001, area: 'area', unit: 'unit', squareMetres, equals: 'rate' },
  ]
  const blank = written('    ')
  const ha: SheetInk['ticks'] = new Map([['unit', [tick(0.9999), tick(1e-4)]]])
  // Golden sheet: 60.0 x 45.0 m, 0.270 ha, 3800 mL, 14.0741 L/ha.
  const rectangle = {
    ab: written(' 600'),
    bc: written(' 450'),
    cd: blank,
    da: blank,
    ac: blank,
    area: written('  270'),
    used: written('3800'),
    rate: written('1407'),
  }

  it('ties sides, area, fuel and litres a hectare of the golden sheet', () => {
    const read = weigh(cells, ties, rectangle, { ticks: ha })
    for (const [key, value] of Object.entries({ ab: 60, bc: 45, area: 0.27, used: 3800, rate: 14.07, unit: 'ha' })) {
      expect(read.get(key)).toMatchObject({ value, state: 'clear' })
    }
  })

  it('settles a smudged side by area, and a smudged area by the rate', () => {
    const side = [plain(BLANK), box({ 6: 0.9, 0: 0.09 }), plain(0), plain(0)]
    expect(weigh(cells, ties, { ...rectangle, ab: side }, { ticks: ha }).get('ab')).toMatchObject({ value: 60, state: 'clear' })
    const area = [plain(BLANK), plain(BLANK), plain(2), box({ 7: 0.9, 1: 0.09 }), plain(0)]
    expect(weigh(cells, ties, { ...rectangle, area }, { ticks: ha }).get('area')).toMatchObject({ value: 0.27, state: 'clear' })
  })

  it('knows four sides with a diagonal: 15, 20, 26, 17 and 25 make 354 m²', () => {
    // NCERT solution pages: 150 + 204 = 354 exactly.
    const four = { ab: written(' 150'), bc: written(' 200'), cd: written(' 260'), da: written(' 170'), ac: written(' 250') }
    const good = weigh(cells, ties, { ...rectangle, ...four, area: written('  035'), rate: blank }, { ticks: ha })
    expect(good.get('area')).toMatchObject({ value: 0.035, state: 'clear' })
    const bad = weigh(cells, ties, { ...rectangle, ...four, area: written('  045'), rate: blank }, { ticks: ha })
    expect(rules(bad.get('area'))).toEqual(['R04'])
  })

  it('reports a wrong area and a wrong rate each on its own result', () => {
    const area = weigh(cells, ties, { ...rectangle, area: written('  370'), rate: written('1027') }, { ticks: ha })
    expect(rules(area.get('area'))).toEqual(['R04'])
    expect(rules(area.get('rate'))).toEqual([])
    const rate = weigh(cells, ties, { ...rectangle, rate: written('1707') }, { ticks: ha })
    expect(rules(rate.get('rate'))).toEqual(['R04'])
    expect(rules(rate.get('area'))).toEqual([])
  })

  it('says nothing against an area whose unit cannot be told', () => {
    const read = weigh(cells, ties, rectangle, { ticks: new Map([['unit', [tick(1e-4), tick(1e-4)]]]) })
    expect(read.get('unit')).toMatchObject({ value: null, state: 'clear' })
    expect(read.get('area')).toMatchObject({ value: 0.27, state: 'clear' })
  })
})

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

describe('units, ticks and limits', () => {
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

  it('says so where the time is up before a group is weighed', () => {
    let clock = 0
    const combs = new Map(
      Object.entries({ start: written('4800'), topup: written('1000'), end: written('2000'), used: written('3800') }),
    )
    const read = weighSheet({ cells: fuelCells, ties: [FUEL] }, { combs, ticks: new Map() }, {}, () => (clock += 3000))
    expect([...read.values()].map((r) => r.reasons[0]?.rule)).toEqual(['R05', 'R05', 'R05', 'R05'])
  })
})
