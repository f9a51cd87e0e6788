import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Tie } from '../../layouts/tie.ts'
import { weighJointly } from './joint.ts'
import { compileTies, type Factor } from './ties/compile.ts'
import type { Variable } from './variable.ts'

const KEYS = ['a', 'b', 'c', 'd', 'e']

/** Readings of a few options with arbitrary weights, `other` last. */
const readings = fc
  .array(fc.array(fc.double({ min: 0.05, max: 1, noNaN: true }), { minLength: 5, maxLength: 5 }), {
    minLength: KEYS.length,
    maxLength: KEYS.length,
  })
  .map((weights) =>
    weights.map((w, i): Variable => {
      const counts = [i, i + 2, 3, null]
      return {
        key: KEYS[i]!,
        label: KEYS[i]!,
        mandatory: i === 0,
        places: 0,
        options: counts.map((count, k) => ({ value: count, count, ink: w[k]!, weakest: 1, weight: w[k]! })),
        otherWeight: w[4]! / 10,
        gap: 0,
        spoiled: 0,
      }
    }),
  )

/** The weight of one full assignment under one tie: its chain, walked once. */
function walk(factor: Factor, counts: ReadonlyArray<number | null | undefined>): number {
  const to = { state: factor.chain.start, weight: 1 }
  let weight = 1
  factor.readings.forEach((reading, at) => {
    factor.chain.step(to.state, at, counts[reading], to)
    weight *= to.weight
  })
  const end = factor.chain.end(to.state)
  return weight * (end.holds + end.fails + end.silent)
}

/** Every assignment of every reading, one by one. */
function bruteForce(variables: readonly Variable[], factors: readonly Factor[]): number[][] {
  const sums = variables.map((v) => new Array<number>(v.options.length + 1).fill(0))
  const visit = (places: number[]): void => {
    if (places.length < variables.length) {
      const v = variables[places.length]!
      for (let k = 0; k <= v.options.length; k++) visit([...places, k])
      return
    }
    const counts = places.map((k, i) => variables[i]!.options[k]?.count)
    let weight = 1
    places.forEach((k, i) => {
      weight *= variables[i]!.options[k]?.weight ?? variables[i]!.otherWeight
    })
    for (const factor of factors) weight *= walk(factor, counts)
    places.forEach((k, i) => {
      sums[i]![k]! += weight
    })
  }
  visit([])
  return sums.map((row) => row.map((w) => w / row.reduce((a, b) => a + b, 0)))
}

const TREE: Tie[] = [
  { kind: 'balance', plus: ['a', 'b'], minus: [], equals: 'c' },
  { kind: 'not-less', less: 'c', greater: 'd' },
  { kind: 'near', keys: ['d', 'e'], amount: 1 },
]
const RINGS: Tie[] = [
  { kind: 'order', keys: ['a', 'b', 'd'], usual_min: 3 },
  { kind: 'order', keys: ['a', 'c', 'd'], usual_min: 3 },
  { kind: 'mean', of: ['a', 'b', 'e'], equals: 'c' },
]

describe('joint weighing', () => {
  for (const [name, ties] of [
    ['on a tree of ties', TREE],
    ['where ties close rings', RINGS],
  ] as const) {
    it(`comes to the same as trying every assignment, ${name}`, () => {
      fc.assert(
        fc.property(readings, (variables) => {
          const factors = compileTies(ties, variables)
          const expected = bruteForce(variables, factors)
          const { posteriors } = weighJointly(variables, factors, () => ({ steps: 1e6, expired: () => false }))
          expected.forEach((row, i) => {
            row.forEach((p, k) => {
              expect(posteriors[i]![k]).toBeCloseTo(p, 4)
            })
          })
        }),
        { numRuns: 25 },
      )
    })
  }

  it('leaves a group undecided, and only that group, where the steps are used up', () => {
    const [variables] = fc.sample(readings, { numRuns: 1, seed: 7 })
    const factors = compileTies([TREE[0]!, TREE[2]!], variables!)
    // Each group is tried twice, the second time more coarsely.
    let groups = 0
    const { posteriors } = weighJointly(variables!, factors, () => ({ steps: groups++ < 2 ? 3 : 1e6, expired: () => false }))
    expect(posteriors.map((p) => p === null)).toEqual([true, true, true, false, false])
  })
})
