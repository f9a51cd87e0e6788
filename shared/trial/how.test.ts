import { expect, it } from 'vitest'
import { buildFacts, buildReadings } from '../../tests/builders/readings.ts'
import { computeResults } from './compute-results.ts'
import { howOf, sourceWords } from './how.ts'

it('every figure has words of its own, and none speaks of another way to compute it', () => {
  const results = computeResults(buildReadings(), buildFacts())
  expect(howOf(results.l_per_ha)).toBe('fuel used ÷ area')
  expect(howOf(results.l_per_h)).toBe('fuel used ÷ time with the engine on')
  for (const result of Object.values(results)) expect(howOf(result)).not.toMatch(/;.*;|, or |formula/)
})

it('the area says the shape it was taped in', () => {
  const area = { key: 'area_m2', formula: 'C05' }
  expect(howOf({ ...area, from: ['side_ab_m', 'side_bc_m'] })).toBe('length × breadth')
  expect(howOf({ ...area, from: ['side_ab_m', 'diag_ac_m', 'deduct_m2'] })).toBe(
    'two triangles on the diagonal − the piece left out',
  )
  expect(howOf({ ...area, from: ['pass_count', 'width_m[1]'] })).toBe('passes × mean width × length')
})

it('where a formula is from is told without tags', () => {
  expect(sourceWords('C03')).toBe('common practice; quantities of IS 9253 and PAES (quoted from memory)')
  expect(sourceWords('C99')).toBe('a formula of another version')
})
