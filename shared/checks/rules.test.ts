import { describe, expect, it } from 'vitest'
import { buildFacts, buildFullReadings, buildOptions, buildReadings } from '../../tests/builders/readings.ts'
import type { Sheet } from '../../tests/builders/rule-case.ts'
import { FIELD_CASES } from '../../tests/builders/rule-cases-field.ts'
import { FUEL_CASES } from '../../tests/builders/rule-cases-fuel.ts'
import { SHEET_CASES } from '../../tests/builders/rule-cases-sheet.ts'
import { RULES, runChecks } from './run-checks.ts'

const CASES = [...FUEL_CASES, ...FIELD_CASES, ...SHEET_CASES]

const run = (s: Sheet) => runChecks(buildReadings(s.readings), buildFacts(s.facts), buildOptions(s.options))

describe('every rule', () => {
  it.each(CASES.map((c) => [c.id, c.severity, c] as const))(
    '%s fires a %s on one sheet and just not on another',
    (id, severity, c) => {
      const hit = run(c.fires).filter((f) => f.rule === id && f.severity === severity)
      expect(hit.length).toBeGreaterThan(0)
      if (c.says) expect(hit.map((f) => f.text).join('\n')).toMatch(c.says)
      const missed = run(c.not).filter((f) => f.rule === id && f.severity === severity && (!c.says || f.text.match(c.says)))
      expect(missed).toEqual([])
    },
  )

  it('has such a pair of sheets', () => {
    expect(RULES.map((rule) => rule.id).filter((id) => !CASES.some((c) => c.id === id))).toEqual([])
  })

  it('has an id of its own and says which severities it can find', () => {
    expect(new Set(RULES.map((rule) => rule.id)).size).toBe(RULES.length)
    // R.. is the reader's: its reasons and these stand side by side on a sheet.
    for (const rule of RULES) expect(rule.id).toMatch(/^[QL]\d\d$/)
    for (const c of CASES) {
      const rule = RULES.find((r) => r.id === c.id)
      for (const f of run(c.fires).filter((x) => x.rule === c.id)) expect(rule?.severity).toContain(f.severity)
    }
  })

  it('tells a full sentence, and names only cells that are on the sheet', () => {
    for (const c of CASES) {
      for (const f of run(c.fires)) {
        expect(f.text).toMatch(/^[A-Z0-9−-].*[.?]$/)
        expect(f.text).not.toMatch(/undefined|null|NaN|[a-z]_[a-z]/)
        const on = buildReadings(c.fires.readings)
        expect(f.cells.filter((cell) => cell !== 'density_15' && on[cell] === undefined)).toEqual([])
      }
    }
  })
})

describe('the golden sheets', () => {
  it('fire nothing', () => {
    expect(runChecks(buildReadings(), buildFacts(), buildOptions())).toEqual([])
    expect(runChecks(buildFullReadings(), buildFacts(), buildOptions())).toEqual([])
  })

  it('fire nothing for what is not on the sheet at all', () => {
    expect(runChecks({}, {})).toEqual([])
  })
})
