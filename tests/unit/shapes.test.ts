import { describe, expect, it } from 'vitest'
import { findLayout } from '../../shared/layouts/registry.ts'
import { chanceOf } from '../simulator/random.ts'
import { CONDITIONS } from '../simulator/shapes/conditions.ts'
import { makeShape } from '../simulator/shapes/make-shape.ts'
import { paperPage } from '../simulator/shapes/reprint.ts'

const layout = findLayout('tillage', 1)!
const conditionOf = (name: string) => CONDITIONS.find((c) => c.name === name)!

describe('conditions', () => {
  it('have names of their own', () => expect(new Set(CONDITIONS.map((c) => c.name)).size).toBe(CONDITIONS.length))

  it('are plain data, so that a set is known by what made it', () => {
    for (const condition of CONDITIONS) expect(JSON.parse(JSON.stringify(condition))).toEqual(condition)
  })

  it('that nobody could read say which advice fits', () => {
    for (const { name, hopeless, fits } of CONDITIONS) if (hopeless) expect(fits?.length, name).toBeGreaterThan(0)
  })

  it('print on paper measured in millimetres of the print', () => {
    expect(paperPage(layout.page, conditionOf('fit-90').print)).toEqual({ width: 210 / 0.9, height: 297 / 0.9 })
    expect(paperPage(layout.page, conditionOf('waves').print)).toEqual(layout.page)
  })

  it('make the same picture again from the same seed, with every written cell in it', async () => {
    const condition = conditionOf('scan-150-grey')
    const [one, two] = [
      await makeShape(condition, layout, chanceOf('shapes test')),
      await makeShape(condition, layout, chanceOf('shapes test')),
    ]
    expect(one.jpeg.equals(two.jpeg)).toBe(true)
    expect(one.truth.level).toBe('scan-150-grey')
    for (const key of Object.keys(one.truth.readings)) {
      const [[left, top], , [right, low]] = one.map.cells[key] as [[number, number], unknown, [number, number]]
      expect(left, key).toBeGreaterThan(0)
      expect(top, key).toBeGreaterThan(0)
      expect(right, key).toBeGreaterThan(left)
      expect(low, key).toBeGreaterThan(top)
    }
  }, 60_000)
})
