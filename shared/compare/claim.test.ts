import { describe, expect, it } from 'vitest'
import { grouped, SIX_PLOTS, sideBySide } from '../../tests/builders/known-data.ts'
import type { Beside, ComparedFigure } from '../schemas/book-comparison.ts'
import type { DesignKind } from '../schemas/comparison.ts'
import { analyse } from './analyse.ts'
import { claimOf, type Matter } from './claim.ts'
import { gapsOf } from './gaps.ts'

const DEPTHS = { A: 15.2, B: 15.1 }
const beside = (key: ComparedFigure, means: Record<string, number>, gap: [number, number, number]): Beside => ({
  key,
  label: key,
  unit: '',
  means: Object.entries(means).map(([treatment, mean]) => ({ treatment, n: 6, mean })),
  gaps: [{ first: 'A', second: 'B', difference: gap[0], interval: [gap[1], gap[2]] }],
})

/** Six plots, in R: A burns 0.867 more, interval 0.358 to 1.375. */
function claim(changes: Partial<Matter> = {}, kind: DesignKind = 'paired', block = 'plot') {
  const observations = kind === 'one factor' ? grouped(SIX_PLOTS) : sideBySide(SIX_PLOTS)
  const names = { response: 'l_per_ha', treatment: 'tractor', block }
  const analysis = analyse(observations, { kind, why: '', names })
  const sides = [beside('depth_mean_cm', DEPTHS, [0.1, -0.3, 0.5]), beside('ml_per_m3', { A: 9, B: 8.6 }, [0.4, 0.1, 0.7])]
  const setting = 'at Kelwadi, ploughing'
  return claimOf({
    figure: 'l_per_ha',
    unit: 'L/ha',
    noun: 'tractor',
    analysis,
    gaps: gapsOf(analysis),
    beside: sides,
    runU: 0.7,
    setting,
    ...changes,
  })
}
const sentence = ({ before, figure, after }: ReturnType<typeof claim>) => `${before} ${figure} ${after}`

describe('the claim', () => {
  it('may be said where pairs leave out zero and the gap is wider than the ± of a run', () => {
    const said = claim()
    expect(said.may).toBe(true)
    expect(sentence(said)).toBe(
      'On 6 paired plots at Kelwadi, ploughing, 15.1 cm deep against 15.2 cm, B used 0.9 ± 0.5 L/ha less than A.',
    )
    expect(said.because).toEqual([
      'the 95 % interval of A − B, 0.36 to 1.38 L/ha, leaves out zero, and the gap, 0.87, is wider than the ± of one run, 0.70.',
    ])
    expect(said.mayNot).toContain('in other soils')
  })

  it('may be said of the same values in blocks of one plot each', () => {
    expect(claim({}, 'blocks').may).toBe(true)
  })

  it('may not be said of the same values where only the days were shared', () => {
    const said = claim({}, 'blocks', 'day')
    expect(said.may).toBe(false)
    expect(said.before).toBe('No difference may be said, because plot and tractor are mixed within a day: B measured')
    expect(said.because).toEqual(['plot and tractor are mixed within a day: only work on the same plots carries a difference'])
  })

  it('gives the interval in the direction of the tables', () => {
    const gaps = [{ first: 'B', second: 'A', difference: -0.9, interval: [-1.4, -0.4] as [number, number] }]
    expect(claim({ gaps }).because[0]).toContain('the 95 % interval of B − A, −1.40 to −0.40 L/ha, leaves out zero')
  })

  it.each<[string, Partial<Matter>, DesignKind, string]>([
    ['the ± of a run is wider than the gap', { runU: 0.9 }, 'paired', 'is not wider than the ± of one run, 0.90'],
    ['the ± of a run is not known', { runU: null }, 'paired', 'the ± of a run is not known'],
    ['fields were unlike', {}, 'one factor', 'the fields differ as well as the tractors'],
    [
      'the interval holds zero',
      { gaps: [{ first: 'A', second: 'B', difference: 0.9, interval: [-0.1, 1.9] }] },
      'paired',
      'the 95 % interval of A − B, −0.10 to 1.90 L/ha, holds zero',
    ],
    [
      'the one that burned less worked shallower, and no less for each m³',
      { beside: [beside('depth_mean_cm', DEPTHS, [2.1, 1.5, 2.7]), beside('ml_per_m3', { A: 9, B: 9 }, [0, -0.3, 0.3])] },
      'paired',
      'B worked 2.1 cm shallower, and for each m³ of soil it did not use less',
    ],
  ])('may not be said where %s', (_what, changes, kind, because) => {
    const said = claim(changes, kind)
    expect(said.may).toBe(false)
    expect(said.before).toBe(
      kind === 'one factor'
        ? 'No difference may be said, because the fields differ as well as the tractors: B measured'
        : 'No difference may be said: B measured',
    )
    expect(said.because.join('; ')).toContain(because)
  })

  it('may be said of shallower work that used less for each m³ of soil too', () => {
    const sides = [beside('depth_mean_cm', DEPTHS, [2.1, 1.5, 2.7]), beside('ml_per_m3', { A: 9, B: 8 }, [1, 0.5, 1.5])]
    expect(claim({ beside: sides }).may).toBe(true)
  })

  it('of more than two takes the widest gap that may be said, and says of how many pairs nothing may', () => {
    const gap = (first: string, second: string, difference: number, from: number, to: number) => ({
      first,
      second,
      difference,
      interval: [from, to] as [number, number],
    })
    const said = claim({
      gaps: [gap('A', 'B', 0.9, 0.2, 1.6), gap('A', 'C', 1.5, 0.8, 2.2), gap('B', 'C', 0.6, -0.1, 1.3)],
      beside: [],
    })
    expect(sentence(said)).toContain('C used 1.5 ± 0.7 L/ha less than A.')
    expect(said.because[0]).toContain('Of 3 pairs 2 may be said; for the other 1 nothing.')
  })
})
