import { describe, expect, it } from 'vitest'
import { triangleArea } from '../../shared/trial/area.ts'
import { metres } from '../../shared/trial/quantity.ts'
import { type Peg, pegsOf } from '../../web/features/record/plot-shape.ts'
import { axisAround } from '../../web/ui/plot/tape-axis.ts'

const between = (a: Peg | undefined, b: Peg | undefined) => Math.hypot((a?.x ?? 0) - (b?.x ?? 0), (a?.y ?? 0) - (b?.y ?? 0))

describe('the plot drawn to scale', () => {
  it('keeps every taped length, with B and D on both sides of the diagonal', () => {
    const lengths = { ab: 62.1, bc: 44.1, cd: 61.1, da: 43.6, ac: 75 }
    const pegs = pegsOf(lengths) ?? []
    const [a, b, c, d] = pegs
    expect(between(a, b)).toBeCloseTo(lengths.ab, 9)
    expect(between(b, c)).toBeCloseTo(lengths.bc, 9)
    expect(between(c, d)).toBeCloseTo(lengths.cd, 9)
    expect(between(d, a)).toBeCloseTo(lengths.da, 9)
    expect(between(a, c)).toBeCloseTo(lengths.ac, 9)
    // Shoelace over the pegs in order gives both triangles by Heron: neither lies over the other.
    const shoelace =
      Math.abs(pegs.reduce((sum, p, i) => sum + p.x * (pegs[(i + 1) % 4]?.y ?? 0) - p.y * (pegs[(i + 1) % 4]?.x ?? 0), 0)) / 2
    const heron =
      (triangleArea(metres(62.1), metres(44.1), metres(75)) ?? 0) + (triangleArea(metres(61.1), metres(43.6), metres(75)) ?? 0)
    expect(shoelace).toBeCloseTo(heron, 6)
  })

  it('draws a rectangle from two sides, and nothing from lengths that do not close', () => {
    expect(pegsOf({ ab: 60, bc: 45 })?.map((p) => p.name)).toEqual(['A', 'B', 'C', 'D'])
    expect(pegsOf({ ab: 10, bc: 10, cd: 10, da: 10, ac: 30 })).toBeNull()
  })
})

describe('the measuring tape under a figure', () => {
  it('holds every figure with a few numbered ticks, and never begins below zero', () => {
    const axis = axisAround([13.4, 14.8, 12.1])
    expect(axis.from).toBeLessThan(12.1)
    expect(axis.to).toBeGreaterThan(14.8)
    expect(axis.major.length).toBeGreaterThanOrEqual(4)
    expect(axis.major.length).toBeLessThanOrEqual(12)
    expect(axisAround([0.1, 0.9]).from).toBe(0)
  })
})
