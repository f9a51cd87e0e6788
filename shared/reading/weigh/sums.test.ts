import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { box, comb, one, place, plain, rules, tick, weigh, written } from '../../../tests/builders/ink.ts'
import type { ChoiceCell, CombCell } from '../../layouts/layout.ts'
import { ACRE_M2, HECTARE_M2, type Tie } from '../../layouts/tie.ts'
import { BLANK } from '../classes.ts'
import { type SheetInk, weighSheet } from './sheet.ts'

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

  it('takes the value of the sum where the ink is as good for either', () => {
    const either = [plain(2), box({ 6: 0.5, 0: 0.47 }), plain(0), plain(0)]
    const read = weigh(fuelCells, [FUEL], { start: written('4800'), topup: written('1000'), end: either, used: written('3800') })
    expect(read.get('end')).toMatchObject({ value: 2000, state: 'clear' })
  })

  it('lets a sum vouch for its result though one part is a second reading of its ink, which a person still looks at', () => {
    const read = weigh(fuelCells, [FUEL], { start: written('4800'), topup: written('1000'), end: two, used: written('3800') })
    expect(read.get('end')!.state).toBe('in doubt')
    expect(read.get('used')).toMatchObject({ value: 3800, state: 'clear' })
  })

  it('makes a reading clear that the ink alone leaves in doubt, where the sum agrees with the ink', () => {
    const likely = [plain(2), box({ 0: 0.9, 6: 0.09 }), plain(0), plain(0)]
    expect(one(comb('end', '9999'), likely).state).toBe('in doubt')
    const read = weigh(fuelCells, [FUEL], { start: written('4800'), topup: written('1000'), end: likely, used: written('3800') })
    for (const key of ['start', 'topup', 'end', 'used']) expect(read.get(key)!.state).toBe('clear')
  })

  it('proposes what the ink says where the sum speaks for a value the ink denies', () => {
    // A shaky 1 that is hardly a 2: the sums ask for 2400, no eye would read it.
    const shaky = [box({ 1: 0.955, 7: 0.03, 2: 0.008 }), plain(4), plain(0), plain(0)]
    const read = weigh(fuelCells, [FUEL], { start: written('4800'), topup: written('    '), end: written('2400'), used: shaky })
    const used = read.get('used')!
    expect(used.state).toBe('in doubt')
    expect(used.value).toBe(1400)
    expect(used.candidates[0]!.value).toBe(1400)
    expect(used.candidates.map((c) => c.value)).toContain(2400)
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

  it('never makes clear a value where the ink favours another, whatever the sum says', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 9 }),
        fc.integer({ min: 0, max: 9 }),
        fc.double({ min: 0.6, max: 0.98, noNaN: true }),
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

  it('says so of the result, and of what its ink leaves open, where the time is up before a group is weighed', () => {
    let clock = 0
    const combs = new Map(
      Object.entries({ start: written('4800'), topup: written('1000'), end: written('2000'), used: written('3800') }),
    )
    const read = weighSheet({ cells: fuelCells, ties: [FUEL] }, { combs, ticks: new Map() }, {}, () => (clock += 11_000))
    expect(rules(read.get('used'))).toEqual(['R05'])
    for (const key of ['start', 'topup', 'end']) expect(read.get(key)!.state).toBe('clear')
    const shaky = [plain(2), box({ 0: 0.9, 6: 0.09 }), plain(0), plain(0)]
    combs.set('end', shaky)
    const again = weighSheet({ cells: fuelCells, ties: [FUEL] }, { combs, ticks: new Map() }, {}, () => (clock += 11_000))
    expect(rules(again.get('end'))).toContain('R05')
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
