import { existsSync, readFileSync } from 'node:fs'
import { z } from 'zod'

const reportSchema = z.object({
  numPassedTests: z.number(),
  numFailedTests: z.number(),
  testResults: z.array(z.object({ status: z.string(), assertionResults: z.array(z.object({ status: z.string() })) })),
})

export interface Tally {
  passed: number
  failed: number
}

/**
 * Counts vitest's JSON report. A file that failed without a failed test (it does not load, or its set-up broke)
 * counts as one failure, and so does a run that failed without saying where.
 */
export function countResults(file: string, exitCode: number): Tally {
  if (!existsSync(file)) return { passed: 0, failed: 1 }
  const report = reportSchema.parse(JSON.parse(readFileSync(file, 'utf8')))
  const broken = report.testResults.filter(
    (one) => one.status === 'failed' && !one.assertionResults.some(({ status }) => status === 'failed'),
  )
  const failed = report.numFailedTests + broken.length
  return { passed: report.numPassedTests, failed: failed === 0 && exitCode !== 0 ? 1 : failed }
}
