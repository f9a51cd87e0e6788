import { describe, expect, it } from 'vitest'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import { fitValue, type Setting, VALUE_SETTINGS } from './fit-value.ts'
import { mm, newPage } from './page.ts'
import { FARMER_LINE, type PrintedPlan, planLines } from './plan-lines.ts'

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

const page = newPage({ title: '', width_mm: 210, height_mm: 297 })
const widthOf = (text: string, { face, size }: Setting) => page.font(face).fontSize(size).widthOfString(text) / mm(1)
/** Labels take 14 mm of a column, and 1 mm stands free before the next. */
const ROOM_MM = tillage1.planBlock.columnWidth - 15

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

  it('cuts no value of a common length, though it is set narrower for it', () => {
    const [line] = planLines({ ...plan, implement: { number: 21, name: 'plough, 3 bottoms', ratedWidth_m: 0.9 } }).slice(6)
    expect(fitValue(line!, ROOM_MM, widthOf).text).toBe('21 plough, 3 bottoms 0.90 m')
    expect(fitValue({ value: '21 Tarnfold 45' }, ROOM_MM, widthOf).setting).toBe(VALUE_SETTINGS[0])
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
    const fitted = lines.map((line) => fitValue(line, ROOM_MM, widthOf))
    for (const { text, setting } of fitted) expect(widthOf(text, setting), text).toBeLessThanOrEqual(ROOM_MM)
    expect(fitted[6]?.text).toMatch(/^9999 .{8,}… 11\.55 m$/)
    for (const { label } of lines) expect(widthOf(label, { face: 'regular', size: 6.6 }), label).toBeLessThan(13.5)
  })

  it('leaves the farmer out once the name is erased', () => {
    const lines = planLines({ ...plan, farmer: null })
    expect(lines[FARMER_LINE]).toEqual({ label: 'farmer', value: '' })
  })
})
