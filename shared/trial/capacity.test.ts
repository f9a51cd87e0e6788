import { describe, expect, it } from 'vitest'
import { effectiveCapacity, fieldEfficiency, theoreticalCapacity, theoreticalCapacityUs, timeEfficiency } from './capacity.ts'
import { hours, kmh, metres, ml, quantity, squareMetres } from './quantity.ts'
import { slipByDistance, slipByTime, slipByTurns } from './slip.ts'
import { speedOverPegs } from './speed.ts'

const seconds = (...times: number[]) => times.map((t) => quantity(t, 's'))
const feet = (inches: number) => quantity(inches / 12, 'ft')
const mph = (v: number) => quantity(v, 'mile/h')

// Check values C07 to C14: the golden sheet, worked out independently to full digits.
describe('work rates', () => {
  it('C07: theoretical field capacity', () => {
    expect(theoreticalCapacity(metres(0.9), kmh(4.3991853360488795))).toBeCloseTo(0.39592668024439914, 14)
  })

  it('C08, C09: effective capacity and field efficiency, by the rated width', () => {
    const efc = effectiveCapacity(squareMetres(2700), hours(52 / 60))
    expect(efc).toBeCloseTo(0.31153846153846154, 14)
    expect(fieldEfficiency(efc, theoreticalCapacity(metres(0.9), kmh(4.3991853360488795)))).toBeCloseTo(78.68589743589745, 11)
    expect(fieldEfficiency(efc, theoreticalCapacity(metres(0.905), kmh(4.3991853360488795)))).toBeCloseTo(78.25116872078198, 11)
  })

  // Golden sheet, C09: 50 passes of 60 m at speed take 40.917 of the 52 min; 45 m in 50 passes is the rated width.
  it('C09: field efficiency by time and overlap is the same figure', () => {
    const time = timeEfficiency(50, metres(60), kmh(4.3991853360488795), hours(52 / 60))
    expect((time * 52) / 100).toBeCloseTo(40.91666666666667, 11)
    expect((time * (45 / 50)) / 0.9).toBeCloseTo(78.68589743589745, 10)
  })

  // E1: Iowa State University PM 696 (2001), studylib copy.
  it.each([
    [8, 18, 0.85, 6.18],
    [7, 16, 0.85, 4.81],
    [12, 18, 0.83, 9.05],
  ])('E1: plough of %d x %d in at 5 mile/h', (bottoms, inches, efficiency, acresPerHour) => {
    expect(efficiency * theoreticalCapacityUs(feet(bottoms * inches), mph(5))).toBeCloseTo(acresPerHour, 2)
  })

  // E2: ICAR e-course lesson pages (ecoursesonline.iasri).
  it('E2: published capacity problems', () => {
    expect(theoreticalCapacity(metres(20), kmh(5))).toBe(10)
    expect(theoreticalCapacity(metres(20), kmh(5)) * (9.25 / 10)).toBeCloseTo(9.25, 12)
    expect(0.8 * theoreticalCapacity(metres(5 * 0.2), kmh(5))).toBeCloseTo(0.4, 12)
    expect(0.7 * theoreticalCapacity(metres(3 * 0.3), kmh(4))).toBeCloseTo(0.252, 12)
  })

  // E4: data of an askfilo page: 40 of 110 minutes per hectare at work; answers computed.
  it('E4: a disc plough by its minutes', () => {
    const tfc = effectiveCapacity(squareMetres(10_000), hours(40 / 60))
    const efc = effectiveCapacity(squareMetres(10_000), hours(110 / 60))
    expect(tfc).toBeCloseTo(1.5, 12)
    expect(efc).toBeCloseTo(0.5454545454545454, 12)
    expect(fieldEfficiency(efc, tfc)).toBeCloseTo(36.36363636363637, 11)
  })

  // E5: abetutorials page (0.984 by the formula, printed 0.56 ha/h at 57 %).
  it('E5: four bottoms of 41 cm at 6 km/h', () => {
    const tfc = theoreticalCapacity(metres(4 * 0.41), kmh(6))
    expect(tfc).toBeCloseTo(0.984, 12)
    expect(0.57 * tfc).toBeCloseTo(0.56088, 10)
  })
})

describe('speed', () => {
  it('C11: all the way by all the time, which is not the mean of the speeds', () => {
    expect(speedOverPegs(metres(20), seconds(16.4, 16.1, 16.6))).toBeCloseTo(4.3991853360488795, 13)
    expect(() => speedOverPegs(metres(20), [])).toThrow('at least one timed run')
  })

  it('takes no volume for a length', () => {
    // @ts-expect-error millilitres are no metres
    expect(speedOverPegs(ml(20), seconds(10))).toBe(7.2)
  })
})

describe('wheel slip', () => {
  it('C12, C13, C14', () => {
    expect(slipByDistance(metres(36.9), metres(42.3))).toBeCloseTo(12.765957446808507, 11)
    expect(slipByTurns(11.5, 10)).toBeCloseTo(13.043478260869565, 12)
    const [loaded, free] = seconds(15, 13)
    expect(slipByTime(loaded ?? quantity(1, 's'), free ?? quantity(1, 's'))).toBeCloseTo(13.333333333333334, 12)
  })

  // E8: two makers' operator manuals (OMRE283529, OMCQ72264).
  it('E8: 10 turns in work against 8½ and 9 without load', () => {
    expect(slipByTurns(10, 8.5)).toBe(15)
    expect(slipByTurns(10, 9)).toBe(10)
  })

  // E9: cdquestions (GATE AG). The page rounds on the way and prints 5.00; 5.184 is right.
  it('E9: radius 0.47 m, 20 turns, 56 m', () => {
    const free = 2 * Math.PI * 0.47 * 20
    expect(free).toBeCloseTo(59.06194188748811, 10)
    expect(slipByDistance(metres(56), metres(free))).toBeCloseTo(5.18428922184958, 10)
  })

  it('is nothing when the ways are equal', () => {
    expect(slipByDistance(metres(40), metres(40))).toBe(0)
    expect(slipByTurns(10, 10)).toBe(0)
  })
})
