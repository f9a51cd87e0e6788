import { describe, expect, it } from 'vitest'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import { mm, newPage } from './page.ts'
import { FARMER_LINE, type PrintedPlan, planLines, VALUE_CHARS } from './plan-lines.ts'

const plan: PrintedPlan = {
  heldOn: '2026-04-09',
  run: 2,
  runs: 3,
  place: { number: 14, name: 'Long Acre' },
  farmer: 'Matis Orrel',
  plot: 'upper, by the ditch',
  tractor: {
    number: 31,
    name: 'Veltra 60',
    ratedPower_kw: 55,
    ratedRpm: 2200,
    drive: '4WD',
    tyreFront: '11.2-24',
    tyreRear: '16.9-30',
  },
  implement: { number: 7, name: 'three-furrow', ratedWidth_m: 0.9 },
  kit: { number: 3, jarCapacity_ml: 5000, jugCapacity_ml: 1000, tapeSerial: 'T-3', gaugeSerial: 'G-3' },
  demonstrator: { number: 12, name: 'R. Imhaut' },
  driver: 'S. Dolm',
}

describe('the typed block', () => {
  it('says what the plan knows, with units', () => {
    expect(planLines(plan).map(({ label, value }) => `${label}: ${value}`)).toEqual([
      'date: 09-04-2026 run 2/3',
      'place: 14 Long Acre',
      'farmer: Matis Orrel',
      'plot: upper, by the ditch',
      'tractor: 31 Veltra 60',
      'engine: 55 kW 2200/min 4WD',
      'implement: 7 three-furrow 0.90 m',
      'tyres: 11.2-24, 16.9-30',
      'kit 3: jar 5000 jug 1000 mL',
      'tape, gauge: T-3, G-3',
      'demonstr.: 12 R. Imhaut',
      'driver: S. Dolm',
    ])
  })

  it('never runs into the next column, and keeps the number and the unit of a value it cuts', () => {
    const long = 'a name that somebody made very long indeed'
    const lines = planLines({
      ...plan,
      place: { number: 9999, name: long },
      farmer: long,
      plot: long,
      tractor: { ...plan.tractor, number: 9999, name: long, ratedPower_kw: 123.45, tyreFront: long, tyreRear: long },
      implement: { number: 9999, name: long, ratedWidth_m: 11.55 },
      kit: { number: 9999, jarCapacity_ml: 20_000, jugCapacity_ml: 5000, tapeSerial: long, gaugeSerial: long },
      demonstrator: { number: 9999, name: long },
      driver: long,
    })
    for (const { value } of lines) expect(value.length).toBeLessThanOrEqual(VALUE_CHARS)
    expect(lines[6]?.value).toMatch(/^9999 .+… 11\.55 m$/)
  })

  it('fits its column in the face it is printed in', () => {
    const { columnWidth } = tillage1.planBlock
    const page = newPage({ title: '', width_mm: 210, height_mm: 297 })
    // As drawn by the sheet's printer: labels in 6.6 pt, values from 14 mm on in bold 7 pt mono.
    const value_mm = page.font('mono-bold').fontSize(7).widthOfString('W'.repeat(VALUE_CHARS)) / mm(1)
    expect(14 + value_mm).toBeLessThan(columnWidth - 1)
    const labels = planLines({ ...plan, kit: { ...plan.kit, number: 9999 } }).map(({ label }) => label)
    for (const label of labels) expect(page.font('regular').fontSize(6.6).widthOfString(label) / mm(1), label).toBeLessThan(13.5)
  })

  it('leaves the farmer out once the name is erased', () => {
    const lines = planLines({ ...plan, farmer: null })
    expect(lines[FARMER_LINE]).toEqual({ label: 'farmer', value: '' })
  })
})
