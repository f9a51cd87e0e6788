import { expect, it } from 'vitest'
import { buildFacts, buildOptions, buildReadings } from '../../tests/builders/readings.ts'
import { FIELD_CASES } from '../../tests/builders/rule-cases-field.ts'
import { FUEL_CASES } from '../../tests/builders/rule-cases-fuel.ts'
import { SHEET_CASES } from '../../tests/builders/rule-cases-sheet.ts'
import { contextOf } from './context.ts'
import { certaintyOf, LIMITS, type LimitName } from './limits.ts'
import { limitsOfRule } from './rule-limits.ts'
import { RULES } from './run-checks.ts'

const SHEETS = [...FUEL_CASES, ...FIELD_CASES, ...SHEET_CASES].flatMap((c) => [c.fires, c.not])

/** Every limit each rule asks for on any of the sheets. */
function askedFor(): Map<string, Set<LimitName>> {
  const asked = new Map<string, Set<LimitName>>()
  for (const sheet of SHEETS) {
    const ctx = contextOf(buildReadings(sheet.readings), buildFacts(sheet.facts), buildOptions(sheet.options))
    for (const rule of RULES) {
      const seen = asked.get(rule.id) ?? new Set()
      asked.set(rule.id, seen)
      rule.check({
        ...ctx,
        limit: (name) => {
          seen.add(name)
          return ctx.limit(name)
        },
      })
    }
  }
  return asked
}

it('every limit a rule compares with is told of that rule, and each limit of some rule', () => {
  for (const [id, names] of askedFor())
    expect([id, [...names].filter((name) => !limitsOfRule(id).includes(name))]).toEqual([id, []])
  const told = new Set(RULES.flatMap((rule) => limitsOfRule(rule.id)))
  expect(Object.keys(LIMITS).filter((name) => !told.has(name as LimitName))).toEqual([])
})

it('every limit says how sure its source is', () => {
  for (const { source } of Object.values(LIMITS)) expect(certaintyOf(source)).toMatch(/^(published|from memory|common practice)$/)
})

it('a limit the office set is the one compared with', () => {
  const findings = (limits: Record<string, number>) =>
    contextOf(buildReadings(), buildFacts({ limits }), buildOptions()).limit('jar_lowest_ml')
  expect(findings({})).toBe(500)
  expect(findings({ jar_lowest_ml: 700 })).toBe(700)
})
