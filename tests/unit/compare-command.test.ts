import { spawnSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { observationsOf } from '../../server/scripts/compare/observations-of.ts'
import { type Analysis, analysisSchema } from '../../shared/schemas/comparison.ts'
import { SIX_PLOTS } from '../builders/known-data.ts'

const folder = mkdtempSync(join(tmpdir(), 'sheafbook-compare-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

function compare(csv: string, ...options: string[]): { analysis: Analysis | null; says: string; status: number | null } {
  const file = join(folder, 'table.csv')
  writeFileSync(file, csv)
  const ran = spawnSync(process.execPath, ['--import', 'tsx', 'server/scripts/compare.ts', file, ...options], {
    encoding: 'utf8',
  })
  const analysis = ran.stdout === '' ? null : analysisSchema.parse(JSON.parse(ran.stdout))
  return { analysis, says: ran.stderr, status: ran.status }
}

const COLUMNS = ['--response', 'l_per_ha', '--treatment', 'tractor']
const SIX = Object.entries(SIX_PLOTS).flatMap(([tractor, values]) => values.map((value, i) => `${tractor},${i + 1},${value}`))
const csvOf = (lines: readonly string[]) => ['tractor,plot,l_per_ha', ...lines].join('\n')

describe('npm run compare', () => {
  it('prints the paired analysis of a table, with the pairs it left out by their lines', () => {
    const { analysis, status } = compare(
      csvOf([...SIX, 'A,7,15.5', 'B,8,']),
      ...COLUMNS,
      '--block',
      'plot',
      '--paired',
      '--gap',
      '1',
    )
    expect(status).toBe(0)
    expect(analysis?.design).toMatchObject({ kind: 'paired', response: 'l_per_ha', block: 'plot', n: 12 })
    // Computed in R.
    expect(analysis?.tests[0]?.t).toBeCloseTo(4.382299, 6)
    expect(analysis?.replicates.needed).toEqual([{ gap: 1, n: 5 }])
    expect(analysis?.leftOut).toEqual([
      { id: 'line 15', reason: 'no l_per_ha' },
      { id: 'line 14', reason: 'plot 7 has no B to pair with' },
    ])
  })

  it('reads a table as spreadsheets save it: marked as UTF-8, with semicolons and blank lines', () => {
    const text = `\uFEFF${csvOf(SIX).replaceAll(',', ';')}\r\n\r\n`
    expect(compare(text, ...COLUMNS, '--block', 'plot').analysis?.design).toMatchObject({ kind: 'blocks', n: 12 })
  })

  it.each<[string, string[], string]>([
    ['--paired without --block', [...COLUMNS, '--paired'], '--paired needs --block'],
    ['an option it does not have', [...COLUMNS, '--rank'], '--rank'],
    ['a column that is not there', ['--response', 'fuel', '--treatment', 'tractor'], 'There is no column “fuel”.'],
  ])('refuses %s, and prints no figure', (_what, options, words) => {
    const { analysis, says, status } = compare(csvOf(SIX), ...options)
    expect(says).toContain(words)
    expect(analysis).toBeNull()
    expect(status).toBe(2)
  })
})

describe('a table', () => {
  const columns = { response: 'l_per_ha', treatment: 'tractor', block: 'plot' }

  it.each([
    ['without a column', 'tractor,fuel\nA,3', 'There is no column “l_per_ha”. The file has: tractor, fuel.'],
    ['with a column twice', `${csvOf(SIX)}`.replace('plot', 'tractor'), 'There are 2 columns “tractor”.'],
    ['with text among its numbers', csvOf([...SIX, 'A,7,about 14']), 'line 14: “about 14”'],
    ['with a decimal comma', csvOf([...SIX, 'A,7,"14,1"']), 'Write decimals with a point.'],
    ['cut short', csvOf([...SIX, 'A,7']), 'Line 14 has 2 columns, the header 3.'],
    ['that is empty', '', 'There is no column'],
  ])('%s is refused in words', (_what, csv, words) => {
    expect(() => observationsOf(csv, columns)).toThrow(words)
  })

  it('keeps its words as they are, a column called __proto__ included', () => {
    const { observations } = observationsOf('__proto__,l_per_ha\n=1+1,14.5', { ...columns, treatment: '__proto__', block: null })
    expect(observations).toEqual([{ id: 'line 2', treatment: '=1+1', block: null, value: 14.5 }])
  })
})
