import { describe, expect, it } from 'vitest'
import { buildReadings } from '../../tests/builders/readings.ts'
import { clockMinutes, clockText, runOf, sinceStart, timesOf } from './clock.ts'
import type { Readings } from './readings.ts'

const run = (changes: Readings) => runOf(buildReadings(changes))
const times = (changes: Readings) => timesOf(buildReadings(changes))

describe('clock readings', () => {
  it('are minutes of the day, or nothing', () => {
    expect(clockMinutes('09:10')).toBe(550)
    expect(clockMinutes('09:10:30')).toBe(550.5)
    expect(clockMinutes('24:00')).toBeNull()
    expect(clockMinutes('09:60')).toBeNull()
    expect(clockMinutes('9.10')).toBeNull()
    expect(clockMinutes(null)).toBeNull()
    expect(clockText(550)).toBe('09:10')
    expect(clockText(1450)).toBe('00:10')
  })
})

describe('a run', () => {
  it('lasts from start to end', () => {
    expect(run({})).toMatchObject({ state: 'known', gross_min: 52, overMidnight: false })
  })

  it('goes over midnight when that makes it 12 h at most', () => {
    expect(run({ t_start: '22:10', t_end: '01:05' })).toMatchObject({ state: 'known', gross_min: 175, overMidnight: true })
    expect(run({ t_start: '13:00', t_end: '01:00' })).toMatchObject({ state: 'known', gross_min: 720 })
  })

  it('was written on a 12 h clock otherwise, and has no time', () => {
    expect(run({ t_start: '13:00', t_end: '01:01' })).toMatchObject({ state: 'impossible', kind: 'twelve_hour' })
    expect(times({ t_start: '09:10', t_end: '02:02' })).toBeNull()
  })

  it('of nothing, or of more than 12 h, has no time', () => {
    expect(run({ t_end: '09:10' })).toMatchObject({ state: 'impossible', kind: 'no_time' })
    expect(run({ t_start: '06:00', t_end: '18:01' })).toMatchObject({ state: 'impossible', kind: 'too_long' })
    expect(run({ t_end: null })).toMatchObject({ state: 'blank' })
  })

  it('places readings on the nearer day', () => {
    const late = run({ t_start: '23:50', t_end: '00:40' })
    if (late.state !== 'known') throw new Error('the run is known')
    expect(sinceStart(late, '00:10')).toBe(20)
    expect(sinceStart(late, '23:46')).toBe(-4)
    const early = run({ t_start: '00:02', t_end: '01:00' })
    if (early.state !== 'known') throw new Error('the run is known')
    expect(sinceStart(early, '23:58')).toBe(-4)
  })
})

describe('times taken out', () => {
  it('are stops with the engine off, from fuel time and field time alike', () => {
    const with_ = times({ 'stop_from[1]': '09:20', 'stop_to[1]': '09:26', 'stop_engine_off[1]': true })
    expect(with_).toMatchObject({ gross_min: 52, fuel_min: 46, field_min: 46, stopsOutOfFuel: 1, stopsOutOfField: 1 })
    expect(with_?.fuelCells).toEqual(['t_start', 't_end', 'stop_from[1]', 'stop_to[1]', 'stop_engine_off[1]'])
  })

  it('are not stops with the engine on, unless they are no work', () => {
    expect(times({ 'stop_from[1]': '09:20', 'stop_to[1]': '09:26' })).toMatchObject({ fuel_min: 52, field_min: 52 })
    const speech = times({ 'stop_from[1]': '09:20', 'stop_to[1]': '09:26', 'stop_reason[1]': 'speech' })
    expect(speech).toMatchObject({ fuel_min: 52, field_min: 46, stopsOutOfFuel: 0, stopsOutOfField: 1 })
    expect(times({ 'stop_from[1]': '09:20', 'stop_to[1]': '09:26', 'stop_reason[1]': 'topup' })).toMatchObject({ field_min: 52 })
  })

  it('are unknown when such a stop is half written', () => {
    expect(times({ 'stop_from[2]': '09:20', 'stop_engine_off[2]': true })).toBeNull()
  })

  it('are known to the second where the watch was read to the second', () => {
    expect(times({ t_start: '09:10:00', t_end: '10:02:00' })?.step_min).toBeCloseTo(1 / 60, 12)
    expect(times({ t_start: '09:10:00', t_end: '10:02' })?.step_min).toBe(1)
  })
})
