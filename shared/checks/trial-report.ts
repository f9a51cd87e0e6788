/** Everything that can be said of one trial: each figure with its budget, and each rule that fired. */
import { sharesOf } from '../trial/budget.ts'
import { howOf, sourceWords } from '../trial/how.ts'
import { FORMULA_VERSION, type Result } from '../trial/result.ts'
import { checkOptions } from './judge-sheet.ts'
import { resultsUnderChecks } from './results-under-checks.ts'
import type { Finding } from './rule.ts'
import { RULES_VERSION } from './run-checks.ts'
import type { TrialFile } from './trial-file.ts'

/** A figure, unrounded, with what it stands on. */
const figureOf = (result: Result) => ({
  value: result.value,
  unit: result.unit,
  u: result.u,
  U: result.U,
  k: result.k,
  formula: result.formula,
  says: howOf(result),
  source: sourceWords(result.formula),
  from: result.from,
  assumes: result.assumes,
  budget: sharesOf(result.budget),
  reason: result.reason,
})

const firedOf = ({ rule, version, severity, cells, compared, text }: Finding) => ({
  id: rule,
  version,
  severity,
  cells,
  compared,
  text,
})

/** Results by key, then `rules` (stops first) and `versions`. Pure; rounds nothing. */
export function trialReport({ layout, readings, facts, limits }: TrialFile) {
  const { results, findings } = resultsUnderChecks(readings, facts, { ...checkOptions(layout), limits })
  return {
    ...Object.fromEntries(Object.values(results).map((result) => [result.key, figureOf(result)])),
    rules: findings.map(firedOf),
    versions: { formulas: FORMULA_VERSION, rules: RULES_VERSION },
  }
}
