import { describe, expect, it } from 'vitest'
import { buildFacts, buildReadings } from '../../tests/builders/readings.ts'
import { computeResults } from './compute-results.ts'
import { spoken } from './spoken.ts'
import { toldOf } from './told.ts'

describe('figures as one says them', () => {
  it.each([
    ['14.1', 'fourteen point one'],
    ['0.7', 'nought point seven'],
    ['4.38', 'four point three eight'],
    ['20', 'twenty'],
    ['101', 'one hundred and one'],
    ['2700', 'two thousand seven hundred'],
    ['2045', 'two thousand and forty-five'],
    ['-3.05', 'minus three point nought five'],
  ])('%s is said "%s"', (figure, words) => expect(spoken(figure)).toBe(words))

  it('says nothing that is no figure', () => expect(() => spoken('14,1')).toThrow(RangeError))
})

describe('what is told of a run', () => {
  const golden = computeResults(buildReadings(), buildFacts())

  it('says the golden run as its sheet gives it: 14.1 give or take 0.7 litres a hectare', () => {
    const told = toldOf(golden, 'plough')
    expect(told.main).toMatchObject({ key: 'l_per_ha', shown: '14.1', shownU: '0.7' })
    expect(told.sentence).toBe(
      'This tractor, on this field, on this day, ploughing fifteen centimetres deep: fourteen point one litres a hectare, give or take nought point seven.',
    )
    expect(told.beside.map((f) => f.label)).toEqual(['an acre', 'an hour', 'depth', 'area', 'fuel', 'time'])
    expect(told.notTested).toContain('other tractors')
  })

  it('tells no figure of fuel that a rule refuses, and why', () => {
    const refusal = { code: 'stopped', text: 'The vent was not ticked open.' }
    const refused = { ...golden }
    for (const key of ['fuel_ml', 'l_per_ha', 'l_per_acre', 'l_per_h'] as const) {
      refused[key] = { ...golden[key], value: null, U: null, reason: refusal as never }
    }
    const told = toldOf(refused, 'plough')
    expect(told).toMatchObject({ main: null, sentence: null, refused: 'The vent was not ticked open.' })
    expect(told.beside.map((f) => f.label)).toEqual(['depth', 'area', 'time'])
  })
})
