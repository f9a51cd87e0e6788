import { describe, expect, it } from 'vitest'
import { buildFacts, buildOptions, buildReadings } from '../../tests/builders/readings.ts'
import type { Readings } from '../trial/readings.ts'
import { RESULT_KEYS, type ResultKey } from '../trial/result.ts'
import { resultsUnderChecks } from './results-under-checks.ts'

const judge = (changes: Readings = {}) => resultsUnderChecks(buildReadings(changes), buildFacts(), buildOptions())
const without = (changes: Readings) => RESULT_KEYS.filter((key) => judge(changes).results[key].value === null)
/** What this sheet does not measure, and what no register tells. */
const NOT_MEASURED = without({})
const nulled = (changes: Readings) => without(changes).filter((key) => !NOT_MEASURED.includes(key))

const FUEL: ResultKey[] = [
  'fuel_ml',
  'l_per_h',
  'l_per_ha',
  'l_per_acre',
  'ml_per_m3',
  'fuel15_ml',
  'mass_kg',
  'kg_per_h',
  'kg_per_ha',
  'l_per_kwh',
  'g_per_kwh',
]

describe('a stop', () => {
  it('leaves every result standing on a sound sheet', () => {
    const { results } = judge()
    const why = NOT_MEASURED.map((key) => results[key].reason?.code)
    expect(new Set(why)).toEqual(new Set(['not_on_sheet', 'missing_fact']))
    expect(NOT_MEASURED.filter((key) => results[key].reason?.code === 'missing_fact')).toEqual([
      'fuel_cost_per_ha',
      'cost_per_ha',
    ])
  })

  it.each([
    ['a line not switched', { pump_return_in_jar: false }],
    ['a vent not ticked', { vent_open: false }],
    ['a blank tick of the circuit', { air_bled: null }],
    ['a blank jar level', { jar_start_ml: null }],
    ['an overfull jar', { jar_start_ml: 5400 }],
    ['levels changed over', { jar_start_ml: 2000, jar_end_ml: 4800 }],
    ['a top-up with a clock and no mL', { 'topup_t[2]': '09:45' }],
  ])('takes back all fuel results, and no others: %s', (_what, changes) => {
    expect(nulled(changes)).toEqual(FUEL)
  })

  it('says which rule took a figure back', () => {
    expect(judge({ vent_open: false }).results.l_per_ha).toMatchObject({
      value: null,
      U: null,
      reason: { code: 'stopped', rule: 'Q34', text: 'Jar vent open is not ticked: no fuel figure without it.' },
    })
  })

  it('on the clock takes back rates and capacities, not litres per hectare', () => {
    const gone = nulled({ t_end: '09:10', jar_end_t: '09:41' })
    expect(gone).toEqual(expect.arrayContaining(['l_per_h', 'efc_ha_h', 'fe_pct']))
    expect(gone).not.toContain('l_per_ha')
  })

  it('that names no cell of a result takes nothing back: signatures, consent', () => {
    expect(nulled({ sign_farmer: false, consent_trial: null })).toEqual([])
  })

  it('on a unit by hand takes back the area as written, and not the one by the sides', () => {
    expect(nulled({ area_unit: null })).toEqual(['area_written_m2'])
  })

  it('a person has resolved takes nothing back', () => {
    const { results } = resultsUnderChecks(buildReadings({ vent_open: false }), buildFacts(), {
      ...buildOptions(),
      resolved: (f) => f.rule === 'Q34',
    })
    expect(results.l_per_ha.value).toBeCloseTo(14.0741, 4)
  })
})

describe('findings', () => {
  it('come with stops first, then doubts, then notes', () => {
    const order = judge({ vent_open: false, rpm_load: 1710, warmup_min: 14 }).findings.map((f) => f.severity)
    expect(order).toEqual([...order].sort((a, b) => ['stop', 'doubt', 'note'].indexOf(a) - ['stop', 'doubt', 'note'].indexOf(b)))
    expect(new Set(order).size).toBe(3)
  })

  it('drop to doubt where a unit slip explains them, and name it', () => {
    const { findings } = judge({ area_written: 0.667 })
    expect(findings.map((f) => [f.rule, f.severity])).toEqual([
      ['Q14', 'doubt'],
      ['Q15', 'doubt'],
    ])
    expect(findings[0]).toMatchObject({
      text: 'Area by hand 0.667 ha, by the sides 0.27 ha: acres written as ha?',
      compared: { written: 0.667, explained_by: 'Q15' },
    })
  })

  it('speak with the words of the layout', () => {
    const { findings } = resultsUnderChecks(
      buildReadings({ jar_end_ml: 2050, fuel_used_written_ml: 3750, l_per_ha_written: 13.89 }),
      buildFacts(),
      buildOptions({ cells: { jar_end_ml: { label: 'jar at the end', unit: 'mL' } } }),
    )
    expect(findings.map((f) => f.text)).toEqual(["Jar at the end 2050 mL is finer than the jar's marks of 200 mL."])
  })

  it('use the limits an office has set', () => {
    const { findings } = resultsUnderChecks(
      buildReadings({ warmup_min: 12 }),
      buildFacts(),
      buildOptions({ limits: { warmup_min: 10 } }),
    )
    expect(findings).toEqual([])
  })
})
