/** The results a sheet's rules leave standing. */
import type { Facts } from '../trial/facts.ts'
import type { Readings } from '../trial/readings.ts'
import { type Results, withoutValue } from '../trial/result.ts'
import { type CheckOptions, contextOf } from './context.ts'
import { AIR_TICKS, CIRCUIT_TICKS } from './fitting.ts'
import type { Finding } from './rule.ts'
import { findingsOf } from './run-checks.ts'

export interface ResultsUnderChecks {
  results: Results
  findings: Finding[]
}

export interface UnderChecksOptions extends CheckOptions {
  /** A stop a person has resolved takes nothing back. */
  resolved?: (finding: Finding) => boolean
}

/** Results with what an unresolved stop forbids taken back: every result that depends on a cell it names is null and says why. */
export function resultsUnderChecks(readings: Readings, facts: Facts = {}, options: UnderChecksOptions = {}): ResultsUnderChecks {
  const ctx = contextOf(readings, facts, options)
  const findings = findingsOf(ctx)
  const stops = findings.filter((f) => f.severity === 'stop' && !options.resolved?.(f))
  const entries = Object.entries(ctx.results).map(([key, result]) => {
    const cells = dependsOn(result.from)
    const stop = stops.find((f) => f.cells.some((cell) => cells.has(cell)))
    return [key, stop ? withoutValue(result, { code: 'stopped', text: stop.text, rule: stop.rule }) : result]
  })
  return { results: Object.fromEntries(entries) as Results, findings }
}

const GUARDS = [...CIRCUIT_TICKS, ...AIR_TICKS, 'topup_ml[1]', 'topup_ml[2]', 'topup_ml[3]']

/** Cells a result stands on: the ones in its formula and, for all that is made of fuel, the fitting of the jar and every filling. */
function dependsOn(from: readonly string[]): Set<string> {
  return new Set(from.some((cell) => /^(jar_start|topup)_/.test(cell)) ? [...from, ...GUARDS] : from)
}
