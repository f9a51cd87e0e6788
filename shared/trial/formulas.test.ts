import { expect, it } from 'vitest'
import { buildFacts, buildReadings } from '../../tests/builders/readings.ts'
import { computeResults } from './compute-results.ts'
import { formulaOf } from './formulas.ts'

it('every result names a formula that says what it does and where it is from', () => {
  for (const result of Object.values(computeResults(buildReadings(), buildFacts()))) {
    expect(formulaOf(result.formula)?.says).toBeTruthy()
    expect(formulaOf(result.formula)?.source).toBeTruthy()
  }
  expect(formulaOf('C99')).toBeNull()
})
