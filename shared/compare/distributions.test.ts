import libraryBelow from '@stdlib/stats-base-dists-studentized-range-cdf'
import libraryQuantile from '@stdlib/stats-base-dists-studentized-range-quantile'
import { describe, expect, it } from 'vitest'
import { referenceText } from '../../tests/builders/known-data.ts'
import { fAbove, tBeyond, tCritical } from './distributions.ts'
import { normalBelow } from './normal.ts'
import { neededFor, tPower } from './replicates.ts'
import { studentizedRangeAbove, studentizedRangeCritical } from './studentized-range.ts'

type Rows = number[][]
/** SciPy 1.17.1. */
const reference = JSON.parse(referenceText('distributions.json')) as Record<
  'rangeAbove' | 'rangeCritical' | 'fAbove' | 'tAbove' | 'power',
  Rows
>
/** The largest relative error over rows that end in the reference value. */
const worst = (rows: Rows, of: (row: number[]) => number) => Math.max(...rows.map((row) => Math.abs(of(row) / row.at(-1)! - 1)))

describe('tails', () => {
  it('of t and F agree with SciPy, into the far tail', () => {
    expect(worst(reference.tAbove, ([t, df]) => tBeyond(t!, df!) / 2)).toBeLessThan(1e-11)
    expect(worst(reference.fAbove, ([f, df1, df2]) => fAbove(f!, df1!, df2!))).toBeLessThan(1e-11)
  })

  // R's qt(.975, df), computed in R 4.2.2.
  it.each([
    [5, 2.5705818],
    [9, 2.2621572],
    [20, 2.0859634],
  ])('of t with %i degrees of freedom leave 5 %% outside R’s quantile', (df, quantile) => {
    expect(tCritical(0.05, df)).toBeCloseTo(quantile, 7)
  })

  it('of the normal curve meet in the middle and vanish at the ends', () => {
    // Φ(1.959963984540054) = 0.975, from memory.
    expect(normalBelow(1.959963984540054)).toBeCloseTo(0.975, 14)
    expect(normalBelow(0)).toBe(0.5)
    expect(normalBelow(-9)).toBe(0)
    expect(normalBelow(9)).toBe(1)
  })
})

describe('the studentized range', () => {
  it('agrees with SciPy from 1 to 1000 degrees of freedom', () => {
    const off = reference.rangeAbove.map(([q, k, df, p]) => Math.abs(studentizedRangeAbove(q!, k!, df!) - p!))
    expect(Math.max(...off)).toBeLessThan(1e-10)
    expect(worst(reference.rangeCritical, ([p, k, df]) => studentizedRangeCritical(p!, k!, df!))).toBeLessThan(1e-9)
  })

  // R's qtukey and ptukey, computed in R 4.2.2.
  it('agrees with R', () => {
    expect(studentizedRangeCritical(0.05, 3, 27)).toBeCloseTo(3.5064261, 7)
    expect(studentizedRangeCritical(0.05, 5, 20)).toBeCloseTo(4.2318567, 6)
    expect(1 - studentizedRangeAbove(3.5, 3, 20)).toBeCloseTo(0.9441082, 7)
  })

  it('is our own code, since the library’s goes wrong with few degrees of freedom; with many they agree', () => {
    expect(libraryBelow(40, 10, 1)).toBeNaN()
    const [, , , p] = reference.rangeAbove.find(([q, k, df]) => q === 40 && k === 10 && df === 2)!
    expect(Math.abs(1 - libraryBelow(40, 10, 2) - p!)).toBeGreaterThan(5e-4)
    expect(studentizedRangeAbove(3.5, 3, 20)).toBeCloseTo(1 - libraryBelow(3.5, 3, 20), 9)
    expect(studentizedRangeCritical(0.05, 5, 20)).toBeCloseTo(libraryQuantile(0.95, 5, 20), 5)
  })

  it('of two means is t', () => {
    expect(studentizedRangeAbove(3 * Math.SQRT2, 2, 7)).toBeCloseTo(tBeyond(3, 7), 12)
  })
})

describe('the needed number', () => {
  it('rests on the noncentral t, which agrees with SciPy', () => {
    expect(worst(reference.power, ([shift, df]) => tPower(shift!, df!))).toBeLessThan(1e-9)
  })

  it('is 5 pairs for a gap of 1.0 L/ha where gaps spread by 0.55 (computed in R)', () => {
    expect(neededFor(1, 0.55, 'pairs', 2)).toEqual({ gap: 1, n: 5 })
  })

  it('grows as the gap shrinks, and is given up beyond 1000', () => {
    const of = (gap: number) => neededFor(gap, 0.55, 'runs a treatment', 2).n
    expect(of(0.5)! > of(1)!).toBe(true)
    expect(of(0.01)).toBeNull()
    expect(of(0)).toBeNull()
  })
})
