import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { boxesOf } from '../../shared/layouts/geometry.ts'
import { isComb } from '../../shared/layouts/layout.ts'
import { findLayout } from '../../shared/layouts/registry.ts'
import { boxDigits } from '../simulator/boxes.ts'
import { drawConditions } from '../simulator/levels.ts'
import { makePhoto } from '../simulator/make-photo.ts'
import { chanceOf } from '../simulator/random.ts'
import { scenarioFor } from '../simulator/scenario-any.ts'
import { tillageScenario } from '../simulator/scenario-tillage.ts'
import { makeWrongSum } from '../simulator/spoil.ts'

const layout = findLayout('tillage', 1)!
const comb = (key: string) => {
  const cell = layout.cells.find((c) => c.key === key)
  if (!cell || !isComb(cell)) throw new Error(`${key} is no comb`)
  return cell
}
const SCAN = { dpi: 200, grey: true, skew: 0.015, scale: 1, copied: false, contrast: 1, jpegQuality: 85 }
const photo = (seed: string) =>
  makePhoto({
    layout,
    level: 'easy',
    chance: chanceOf(seed),
    digits: 'held back',
    planned: false,
    adjust: (c) => ({ ...c, scan: SCAN, dirt: null, lost: null }),
  })

describe('the photo simulator', () => {
  it('makes the same photo from the same seed, and another trial from another', async () => {
    const [a, b] = [await photo('one'), await photo('one')]
    expect(a.jpeg.equals(b.jpeg)).toBe(true)
    expect(a.truth).toEqual(b.truth)
    expect(tillageScenario(chanceOf('one'))).not.toEqual(tillageScenario(chanceOf('two')))
  }, 60_000)

  it('says where each box lies: written boxes are dark inside, blank ones are not', async () => {
    const { jpeg, truth, map } = await photo('places')
    const { data, info } = await sharp(jpeg).raw().toBuffer({ resolveWithObject: true })
    const darkest = (corners: ReadonlyArray<readonly [number, number]>) => {
      const xs = corners.map((p) => p[0])
      const ys = corners.map((p) => p[1])
      const [left, right, top, low] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)]
      const values: number[] = []
      for (let y = Math.round(top + 6); y < low - 6; y += 1) {
        for (let x = Math.round(left + 6); x < right - 6; x += 1) values.push(data[(y * info.width + x) * info.channels]!)
      }
      return values.sort((p, q) => p - q)[Math.floor(values.length * 0.02)]!
    }
    const boxesDark = (key: string) => boxesOf(comb(key)).map((_, i) => darkest(map.cells[`${key}#${i + 1}`]!) < 150)
    const written = layout.cells.filter(isComb).filter((c) => !truth.spoiled.includes(c.key))
    let right = 0
    for (const cell of written) {
      const value = truth.readings[cell.key] ?? null
      const inked = boxesDark(cell.key).filter(Boolean).length
      const least =
        value === null
          ? 0
          : boxDigits(cell, value, value === 0 ? 1 : scaleOf(truth.readings, cell.scale), false).filter((d) => d !== null).length
      if (value === null ? inked === 0 : inked >= least) right += 1
    }
    expect(right / written.length).toBeGreaterThan(0.97)
  }, 60_000)

  it('invents trials whose sums hold', () => {
    for (let n = 0; n < 60; n += 1) {
      const { readings } = tillageScenario(chanceOf(`sums ${n}`))
      const number = (key: string) => Number(readings[key] ?? 0)
      const filled = [1, 2, 3].reduce((sum, k) => sum + number(`topup_ml[${k}]`), 0)
      expect(number('jar_start_ml') + filled - number('jar_end_ml')).toBe(number('fuel_used_written_ml'))
      expect(String(readings.t_end) > String(readings.t_start)).toBe(true)
      const depths = Array.from({ length: 10 }, (_, i) => number(`depth_cm[${i + 1}]`))
      const mean = depths.reduce((a, b) => a + b, 0) / 10
      expect(Math.abs(mean - number('depth_mean_written_cm'))).toBeLessThan(0.0501)
    }
  })

  it('makes a wrong sum wrong by more than rounding, and says which', () => {
    for (let n = 0; n < 60; n += 1) {
      const scenario = tillageScenario(chanceOf(`wrong ${n}`))
      const before = { ...scenario.readings }
      makeWrongSum(scenario, layout, chanceOf(`slip ${n}`))
      const changed = Object.keys(before).filter((key) => before[key] !== scenario.readings[key])
      expect(changed).toEqual(scenario.wrongSum)
      for (const key of changed) {
        const [right, wrong] = [Number(before[key]), Number(scenario.readings[key])]
        expect(Math.abs(wrong - right) / right).toBeGreaterThan(0.02)
      }
    }
  })

  it('fills a layout it has no story for: every value fits its boxes, times run in order, means hold', () => {
    const other = { ...layout, key: 'another' }
    for (let n = 0; n < 40; n += 1) {
      const { readings } = scenarioFor(other, chanceOf(`any ${n}`))
      for (const cell of other.cells.filter(isComb)) {
        const digits = boxDigits(cell, readings[cell.key]!, scaleOf(readings, cell.scale), true)
        expect(digits).toHaveLength(boxesOf(cell).length)
      }
      const widths = [1, 2, 3, 4, 5].flatMap((k) => readings[`width_m[${k}]`] ?? []).map(Number)
      const mean = widths.reduce((a, b) => a + b, 0) / widths.length
      expect(Math.abs(mean - Number(readings.width_mean_written_m))).toBeLessThan(0.00051)
      if (readings.t_start && readings.t_end) expect(String(readings.t_end) >= String(readings.t_start)).toBe(true)
    }
  })

  it('grows harder from level to level', () => {
    const mean = (level: 'easy' | 'ordinary' | 'hard', of: (c: ReturnType<typeof drawConditions>) => number) =>
      Array.from({ length: 80 }, (_, n) => of(drawConditions(level, chanceOf(`level ${n}`)))).reduce((a, b) => a + b, 0) / 80
    for (const of of [
      (c: ReturnType<typeof drawConditions>) => c.curl_mm,
      (c: ReturnType<typeof drawConditions>) => c.optics.defocus_px + c.optics.shake_px,
      (c: ReturnType<typeof drawConditions>) => Math.abs(c.shot.pitch),
      (c: ReturnType<typeof drawConditions>) => c.light.shadow,
    ]) {
      expect(mean('ordinary', of)).toBeGreaterThan(mean('easy', of))
      expect(mean('hard', of)).toBeGreaterThan(mean('ordinary', of))
    }
  })
})

describe('digits in boxes', () => {
  it('stand at the right, with leading boxes empty or zero, and decimals filled', () => {
    expect(boxDigits(comb('depth_cm[1]'), 9.5, 1, false)).toEqual([null, 9, 5])
    expect(boxDigits(comb('depth_cm[1]'), 9.5, 1, true)).toEqual([0, 9, 5])
    expect(boxDigits(comb('width_m[1]'), 0.9, 1, false)).toEqual([0, 9, 0])
  })

  it('are hundredths where the gauge reads in bar', () => {
    expect(boxDigits(comb('tyre_p_fl'), 1.9, 0.01, false)).toEqual([1, 9, 0])
  })

  it('write times and dates whole', () => {
    expect(boxDigits(comb('t_start'), '09:05', 1, false)).toEqual([0, 9, 0, 5])
    expect(boxDigits(comb('trial_date'), '2026-09-18', 1, false)).toEqual([1, 8, 0, 9, 2, 0, 2, 6])
  })

  it('refuse a value that is wider than the comb', () => {
    expect(() => boxDigits(comb('pass_count'), 1000, 1, false)).toThrow(/pass_count: 1000 does not fit 999/)
  })
})

function scaleOf(
  readings: Readonly<Record<string, unknown>>,
  scale: { by: string; factors: Record<string, number> } | undefined,
): number {
  const unit = scale && readings[scale.by]
  return (typeof unit === 'string' && scale?.factors[unit]) || 1
}
