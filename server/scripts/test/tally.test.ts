import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { countResults } from './tally.ts'

const folder = mkdtempSync(join(tmpdir(), 'sheafbook-tally-'))
afterAll(() => rmSync(folder, { recursive: true }))

describe('counting what vitest reports', () => {
  it('takes over passed and failed tests', () => {
    const file = report({
      numPassedTests: 3,
      numFailedTests: 1,
      testResults: [{ status: 'failed', assertionResults: [{ status: 'failed' }] }],
    })
    expect(countResults(file, 1)).toEqual({ passed: 3, failed: 1 })
  })

  it('counts a file that does not load', () => {
    const file = report({ numPassedTests: 3, numFailedTests: 0, testResults: [{ status: 'failed', assertionResults: [] }] })
    expect(countResults(file, 1)).toEqual({ passed: 3, failed: 1 })
  })

  it('counts a run that failed outside every test', () => {
    const file = report({
      numPassedTests: 3,
      numFailedTests: 0,
      testResults: [{ status: 'passed', assertionResults: [{ status: 'passed' }] }],
    })
    expect(countResults(file, 1)).toEqual({ passed: 3, failed: 1 })
    expect(countResults(file, 0)).toEqual({ passed: 3, failed: 0 })
  })

  it('counts a run that left no report', () => {
    expect(countResults(join(folder, 'none.json'), 1)).toEqual({ passed: 0, failed: 1 })
  })
})

function report(content: object): string {
  const file = join(folder, 'report.json')
  writeFileSync(file, JSON.stringify(content))
  return file
}
