import { expect, test } from 'vitest'
import { findLayout } from '../../shared/layouts/registry.ts'
import { boxCharacters, typedValue } from '../../web/features/desk/model/typed-value.ts'

const cellOf = (key: string) => {
  const cell = findLayout('tillage', 1)?.cells.find((c) => c.key === key)
  if (!cell) throw new Error(`no cell ${key}`)
  return cell
}

test.each([
  ['depth_cm[4]', '140', 14],
  ['depth_cm[4]', '14,5', 14.5],
  ['depth_cm[4]', '14.5', 14.5],
  ['jar_end_ml', '2600', 2600],
  ['side_ab_m', '600', 60],
  ['t_start', '904', '09:04'],
  ['t_start', '09:04', '09:04'],
  ['trial_date', '13102026', '2026-10-13'],
])('in %s, "%s" is %s', (key, text, value) => {
  expect(typedValue(cellOf(key), text, {})).toEqual({ value, problem: null })
})

test.each([
  ['depth_cm[4]', ''],
  ['depth_cm[4]', '14.55'],
  ['jar_end_ml', '26000'],
  ['t_start', '2460'],
  ['trial_date', '31022026'],
  ['jar_end_ml', '2x'],
])('in %s, "%s" is refused with a sentence', (key, text) => {
  expect(typedValue(cellOf(key), text, {})).toMatchObject({ value: null, problem: expect.stringMatching(/\.$/) })
})

test('pressures written in hundredths take their scale from the unit that is ticked', () => {
  const cell = cellOf('tyre_p_fl')
  expect(typedValue(cell, '190', { tyre_p_unit: 'bar' })).toEqual({ value: 1.9, problem: null })
  expect(typedValue(cell, '26', { tyre_p_unit: 'psi' })).toEqual({ value: 26, problem: null })
})

test('a value its boxes cannot hold is not rounded into them', () => {
  const cell = cellOf('tyre_p_fl')
  if (cell.kind !== 'digits') throw new Error('a pressure is digits')
  expect(boxCharacters(cell, 1.75, { tyre_p_unit: null })).toBeNull()
  expect(boxCharacters(cell, 1.75, { tyre_p_unit: 'bar' })).toEqual(['1', '7', '5'])
  expect(boxCharacters(cell, 26, { tyre_p_unit: 'psi' })).toEqual(['', '2', '6'])
})
