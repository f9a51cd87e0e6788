/** NIST StRD: how many certified digits the comparison keeps. The floors are what was measured, rounded down. */
import { describe, expect, it } from 'vitest'
import { fitOneFactor } from '../../shared/compare/one-factor.ts'
import { mean, standardDeviation } from '../../shared/trial/stats.ts'
import { nistGroups, referenceText, smLs } from '../builders/known-data.ts'

/** Log relative error: leading digits two figures share, at most 15. */
const digits = (got: number, certified: number) =>
  got === certified ? 15 : Math.min(15, -Math.log10(Math.abs(got / certified - 1)))

const numbersOf = (file: string, firstLine: number) =>
  referenceText(file)
    .split('\n')
    .slice(firstLine - 1)
    .filter((line) => /^\s*[\d.]+\s*$/.test(line))
    .map(Number)

describe('mean and standard deviation of NIST’s univariate sets', () => {
  it.each([
    ['Lottery.txt', 1, 218, 518.95871559633, 291.699727470969, 14],
    ['Mavro.txt', 61, 50, 2.001856, 0.000429123454003053, 13],
    ['Michelso.txt', 61, 100, 299.8524, 0.0790105478190518, 13],
  ])('%s', (file, firstLine, n, certifiedMean, certifiedSd, kept) => {
    const values = numbersOf(file, firstLine)
    expect(values).toHaveLength(n)
    expect(digits(mean(values), certifiedMean)).toBeGreaterThan(14)
    expect(digits(standardDeviation(values)!, certifiedSd)).toBeGreaterThan(kept)
  })
})

describe('one-way squares of NIST’s analysis-of-variance sets', () => {
  // Certified: between, within, F, R². Nine leading digits in common leave ten digits of F, twelve leave four: the data hold no more.
  it.each([
    ['SiRstv', nistGroups('SiRstv.dat'), [5.11462616e-2, 2.1663656e-1, 1.18046237440255, 0.190999039051129], 13],
    ['AtmWtAg', nistGroups('AtmWtAg.dat'), [3.638341875e-9, 1.04951729166667e-8, 15.946733567793, 0.257426544538321], 10],
    ['SmLs01', smLs(1, 21), [1.68, 1.8, 21, 0.482758620689655], 14],
    ['SmLs02', smLs(1, 201), [16.08, 18, 201, 0.471830985915493], 14],
    ['SmLs03', smLs(1, 2001), [160.08, 180, 2001, 0.470712773465067], 13],
    ['SmLs04', smLs(1e6, 21), [1.68, 1.8, 21, 0.482758620689655], 9.8],
    ['SmLs05', smLs(1e6, 201), [16.08, 18, 201, 0.471830985915493], 9.8],
    ['SmLs06', smLs(1e6, 2001), [160.08, 180, 2001, 0.470712773465067], 9.8],
    ['SmLs07', smLs(1e12, 21), [1.68, 1.8, 21, 0.482758620689655], 3.8],
    ['SmLs08', smLs(1e12, 201), [16.08, 18, 201, 0.471830985915493], 3.8],
    ['SmLs09', smLs(1e12, 2001), [160.08, 180, 2001, 0.470712773465067], 3.8],
  ] as const)('%s', (_name, observations, [between, within, f, rSquared], kept) => {
    const fit = fitOneFactor(observations, { treatment: 'treatment' })
    const [treatment, residual] = fit.squares
    const reached = [
      digits(treatment!.ss, between),
      digits(residual!.ss, within),
      digits(treatment!.f!, f),
      digits(fit.rSquared, rSquared),
    ]
    expect(Math.min(...reached)).toBeGreaterThan(kept)
  })
})
