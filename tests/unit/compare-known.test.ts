/** Comparisons whose results are published or were computed in R 4.2.2; each case names which. */
import { describe, expect, it } from 'vitest'
import { analyse } from '../../shared/compare/analyse.ts'
import { fitBlocks } from '../../shared/compare/blocks.ts'
import type { Observation } from '../../shared/compare/observations.ts'
import { fitOneFactor } from '../../shared/compare/one-factor.ts'
import type { Analysis, DesignKind } from '../../shared/schemas/comparison.ts'
import {
  GRUBBS_EXAMPLE,
  grouped,
  immer,
  NPK,
  PLANT_GROWTH,
  referenceText,
  SIX_PLOTS,
  SLEEP,
  sideBySide,
} from '../builders/known-data.ts'

const names = { response: 'yield', treatment: 'treatment', block: 'block' }
const compare = (observations: readonly Observation[], kind: DesignKind, gaps?: number[]): Analysis =>
  analyse(observations, { kind, why: 'the test says so', names, ...(gaps ? { gaps } : {}) })
const pairOf = (analysis: Analysis, first: string, second: string) =>
  analysis.pairwise.find((p) => p.first === first && p.second === second)!

describe('paired t', () => {
  it('of R’s sleep', () => {
    const [test] = compare(sideBySide(SLEEP), 'paired').tests
    expect(test!.t).toBeCloseTo(-4.0621276834, 9)
    expect(test!.df).toBe(9)
    expect(test!.p).toBeCloseTo(0.0028328902, 10)
    expect(test!.interval[0]).toBeCloseTo(-2.4598858, 7)
    expect(test!.interval[1]).toBeCloseTo(-0.7001142, 7)
  })

  it('of six plots worked by two tractors (computed in R)', () => {
    const { tests, replicates } = compare(sideBySide(SIX_PLOTS), 'paired', [1])
    expect(tests[0]).toMatchObject({ first: 'A', second: 'B', n: 6, df: 5 })
    expect(tests[0]!.difference).toBeCloseTo(0.866667, 6)
    expect(tests[0]!.sd).toBeCloseTo(0.484424, 6)
    expect(tests[0]!.t).toBeCloseTo(4.382299, 6)
    expect(tests[0]!.p).toBeCloseTo(0.0071392, 7)
    expect(tests[0]!.interval[0]).toBeCloseTo(0.358295, 6)
    expect(tests[0]!.interval[1]).toBeCloseTo(1.375039, 6)
    expect(replicates.needed).toEqual([{ gap: 1, n: 5 }])
  })

  it('of two years of MASS’s immer', () => {
    const years = [...immer('Y1').map((o) => ({ ...o, year: 'Y1' })), ...immer('Y2').map((o) => ({ ...o, year: 'Y2' }))]
    const pairs = years.map((o) => ({ ...o, treatment: o.year, block: `${o.block} ${o.treatment}` }))
    const [test] = compare(pairs, 'paired').tests
    expect(test!.t).toBeCloseTo(3.3239873043, 9)
    expect(test!.df).toBe(29)
    expect(test!.p).toBeCloseTo(0.0024126339, 10)
  })

  it('lists a run without a partner and goes on without it', () => {
    const lonely = { id: '99', treatment: 'A', block: '7', value: 40 }
    const { tests, leftOut, design } = compare([...sideBySide(SIX_PLOTS), lonely], 'paired')
    expect(tests[0]!.t).toBeCloseTo(4.382299, 6)
    expect(design.n).toBe(12)
    expect(leftOut).toEqual([{ id: '99', reason: 'block 7 has no B to pair with' }])
  })

  it.each([
    ['a third treatment', sideBySide({ ...SIX_PLOTS, C: [1] }), 'needs two of treatment; there are 3'],
    [
      'a treatment twice in a pair',
      [...sideBySide(SIX_PLOTS), { id: 'x', treatment: 'A', block: '1', value: 3 }],
      'block 1 holds 2',
    ],
    ['one pair', sideBySide({ A: [1], B: [2] }), 'there is one'],
    ['equal gaps', sideBySide({ A: [1, 2], B: [2, 3] }), 'no spread'],
  ])('refuses %s', (_what, observations, words) => {
    expect(() => compare(observations, 'paired')).toThrow(words)
  })
})

describe('one factor', () => {
  it('gives R’s PlantGrowth: F, Tukey and Holm', () => {
    const analysis = compare(grouped(PLANT_GROWTH), 'one factor')
    const [treatment, residual] = analysis.squares!
    expect(treatment).toMatchObject({ df: 2 })
    expect(treatment!.f).toBeCloseTo(4.84609, 5)
    expect(treatment!.p).toBeCloseTo(0.01591, 5)
    expect(residual).toMatchObject({ df: 27, f: null, p: null })
    expect(residual!.ms).toBeCloseTo(0.3885959259, 10)
    // R names these pairs the other way round: trt1-ctrl, trt2-ctrl, trt2-trt1.
    const pairs = [pairOf(analysis, 'ctrl', 'trt1'), pairOf(analysis, 'ctrl', 'trt2'), pairOf(analysis, 'trt1', 'trt2')]
    const tukey = [0.3908711442, 0.1979959913, 0.012006424]
    const holm = [0.1943878801, 0.1753633501, 0.0133777081]
    pairs.forEach((pair, i) => {
      expect(pair.pTukey).toBeCloseTo(tukey[i]!, 9)
      expect(pair.pHolm).toBeCloseTo(holm[i]!, 9)
    })
    expect(analysis.hsd).toBeCloseTo(0.6912161, 7)
    expect(pairs[0]!.tukeyInterval[1] - pairs[0]!.difference).toBeCloseTo(0.6912161, 7)
  })

  it('sets Welch’s F beside it, which for two treatments is Welch’s t squared', () => {
    const { welchF, tests } = compare(grouped(SLEEP), 'one factor')
    const welch = tests.find((t) => t.method === 'Welch t')!
    // R's t.test(extra ~ group).
    expect(welch.t).toBeCloseTo(-1.8608134675, 9)
    expect(welch.df).toBeCloseTo(17.77647352, 8)
    expect(welch.p).toBeCloseTo(0.0793941402, 10)
    expect(welchF!.f).toBeCloseTo(welch.t ** 2, 10)
    expect(welchF!.df2).toBeCloseTo(welch.df, 10)
    expect(welchF!.p).toBeCloseTo(welch.p, 12)
  })

  it('gives the e-Handbook’s cars of two countries (1.3.5.3)', () => {
    const cars = JSON.parse(referenceText('auto83b.json')) as { us_mpg: number[]; japan_mpg: number[] }
    const { tests, groups } = compare(grouped({ US: cars.us_mpg, Japan: cars.japan_mpg }), 'one factor')
    const [welch, pooled] = tests
    expect(groups.map((g) => [g.n, g.mean.toFixed(5), g.sd!.toFixed(5)])).toEqual([
      [249, '20.14458', '6.41470'],
      [79, '30.48101', '6.10771'],
    ])
    expect(pooled!.sd).toBeCloseTo(6.3426, 5)
    expect(pooled!.t).toBeCloseTo(-12.62059, 5)
    expect(pooled!.df).toBe(326)
    expect(welch!.t).toBeCloseTo(-12.94627, 5)
    // Published 136.87499, from means and deviations rounded to five places.
    expect(welch!.df).toBeCloseTo(136.87499, 4)
  })

  it.each([
    ['one treatment', grouped({ A: [1, 2, 3] }), 'needs two of treatment'],
    ['one run each', grouped({ A: [1], B: [2] }), 'too few values'],
    ['runs that do not differ', grouped({ A: [1, 1], B: [2, 2] }), 'no spread'],
    ['nothing', [], 'no value to compare'],
  ])('refuses %s', (_what, observations, words) => {
    expect(() => compare(observations, 'one factor')).toThrow(words)
  })
})

describe('blocks', () => {
  it('give MASS’s immer: table, least differences, Tukey', () => {
    const analysis = compare(immer('Y1'), 'blocks')
    const [variety, place, residual] = analysis.squares!
    expect([variety!.ss, place!.ss, residual!.ss].map((ss) => ss.toFixed(6))).toEqual([
      '2756.624667',
      '17829.846667',
      '3257.743333',
    ])
    expect([variety!.df, place!.df, residual!.df]).toEqual([4, 5, 20])
    expect(variety!.f).toBeCloseTo(4.23088, 5)
    expect(variety!.p).toBeCloseTo(0.012139, 6)
    expect(analysis.lsd).toBeCloseTo(15.370553, 6)
    expect(analysis.hsd).toBeCloseTo(22.049501, 6)
    expect(pairOf(analysis, 'M', 'T').pTukey).toBeCloseTo(0.0227052, 7)
  })

  it('give R’s npk, effect by effect, since its effects do not lean on each other', () => {
    const signs = ['N', 'P', 'K', 'NP', 'NK', 'PK'].map((effect) => {
      const observations = NPK.map(({ given, block, yield: value }, i) => {
        const withheld = [...effect].filter((letter) => !given.includes(letter)).length
        return { id: String(i), treatment: withheld % 2 === 0 ? '+' : '-', block, value }
      })
      return fitBlocks(observations, { treatment: effect, block: 'block' }).squares
    })
    const [n, p, k] = signs.map(([effect]) => effect!)
    expect(n!.ss).toBeCloseTo(189.281667, 6)
    expect(k!.ss).toBeCloseTo(95.201667, 6)
    expect(signs[0]![1]!.ss).toBeCloseTo(343.295, 6)
    // What no effect takes is the residual of the full model: 24 plots − 6 blocks − 6 effects leave 12.
    const others = signs.slice(1).reduce((sum, [effect]) => sum + effect!.ss, 0)
    const residual = signs[0]![2]!.ss - others
    expect(p!.ss).toBeGreaterThan(0)
    expect(residual).toBeCloseTo(185.286667, 6)
    expect(n!.ss / (residual / 12)).toBeCloseTo(12.25873, 5)
  })

  it('fit what is left by least squares when a cell is empty', () => {
    const whole = immer('Y1')
    const analysis = compare(whole.slice(1), 'blocks')
    expect(analysis.squares!.map((row) => row.df)).toEqual([4, 5, 19])
    // The missing-plot value that makes the residual least gives the same residual in the whole table (Yates 1933).
    const residualWith = (value: number) => compare([{ ...whole[0]!, value }, ...whole.slice(1)], 'blocks').squares![2]!.ss
    const [at0, at1, at2] = [residualWith(0), residualWith(1), residualWith(2)]
    const bend = at2 - 2 * at1 + at0
    const best = (at0 - at1) / bend + 0.5
    expect(analysis.squares![2]!.ss).toBeCloseTo(residualWith(best), 6)
    expect(analysis.hsd).toBeNull()
  })

  it('take several values in a cell as they are', () => {
    const twice = immer('Y1').flatMap((o) => [o, { ...o, id: `${o.id} again`, value: o.value + 1 }])
    expect(compare(twice, 'blocks').squares!.map((row) => row.df)).toEqual([4, 5, 50])
  })

  it('agree with the paired test where two treatments share every block', () => {
    const [paired] = compare(sideBySide(SIX_PLOTS), 'paired').tests
    const [pair] = compare(sideBySide(SIX_PLOTS), 'blocks').pairwise
    expect(pair!.t).toBeCloseTo(paired!.t, 10)
    expect(pair!.p).toBeCloseTo(paired!.p, 12)
    expect(pair!.pTukey).toBeCloseTo(paired!.p, 10)
    expect(pair!.interval[0]).toBeCloseTo(paired!.interval[0], 10)
  })

  it('refuse treatments that nothing links, such as the halves of R’s npk', () => {
    const plots = NPK.map(({ given, block, yield: value }, i) => ({ id: String(i), treatment: given, block, value }))
    expect(() => compare(plots, 'blocks')).toThrow('nothing links them')
    expect(() => compare(sideBySide({ A: [1], B: [2] }), 'blocks')).toThrow('Blocks need two')
  })
})

describe('wild values', () => {
  it('are shown, not dropped: the e-Handbook’s list (1.3.5.17.1)', () => {
    const { outliers, groups } = compare(grouped({ A: GRUBBS_EXAMPLE, B: [200, 201] }), 'one factor')
    expect(outliers.grubbs).toHaveLength(1)
    expect(outliers.grubbs[0]).toMatchObject({ treatment: 'A', id: 'A 8', value: 245.57, n: 8, beyond: true })
    expect(outliers.grubbs[0]!.g).toBeCloseTo(2.468765, 6)
    expect(outliers.grubbs[0]!.critical).toBeCloseTo(2.126645, 6)
    expect(outliers.robust.map((r) => r.id)).toEqual(['A 8'])
    expect(outliers.robust[0]!.z).toBeCloseTo(29.963, 3)
    expect(groups[0]!.n).toBe(8)
    expect(groups[0]!.mean).toBeCloseTo(206.43375, 8)
  })
})

describe('a difference', () => {
  it('is first − second in order of first appearance, whatever the values', () => {
    const { treatments } = fitOneFactor(grouped({ late: [5, 6], early: [1, 2] }), { treatment: 't' })
    expect(treatments).toEqual(['late', 'early'])
    const [pair] = compare(grouped({ late: [5, 6], early: [1, 2] }), 'one factor').pairwise
    expect(pair).toMatchObject({ first: 'late', second: 'early', difference: 4 })
  })
})
