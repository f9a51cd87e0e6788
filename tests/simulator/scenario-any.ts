/**
 * Values for a layout that has no scenario of its own: each within its limits and its boxes, results worked out where the
 * layout ties them to others, clock times in their order. Plausible to a machine, if not to a farmer.
 */
import { type CombCell, isComb, type Layout } from '../../shared/layouts/layout.ts'
import type { Tie } from '../../shared/layouts/tie.ts'
import type { Chance } from './random.ts'
import { clock, type Scenario, toPlaces, type Written } from './scenario.ts'
import { tillageScenario } from './scenario-tillage.ts'

const placesOf = (cell: CombCell) => (cell.format.includes('.') ? cell.format.length - cell.format.indexOf('.') - 1 : 0)

/** Largest number the boxes hold. */
const largest = (cell: CombCell) => Number(cell.format.replace(/9/g, '9'))

function numberFor(cell: CombCell, chance: Chance, scale: number): number {
  const [low, high] = cell.plausible ?? cell.hard ?? [0, largest(cell)]
  const value = chance.between(Math.max(0, low), Math.min(high, largest(cell))) * scale
  return toPlaces(value, scale < 1 ? 2 : placesOf(cell))
}

function draw(layout: Layout, chance: Chance): Record<string, Written> {
  const readings: Record<string, Written> = {}
  for (const cell of layout.cells) {
    if (cell.kind === 'choice') readings[cell.key] = chance.pick(cell.options).option
  }
  for (const cell of layout.cells) {
    const blank = cell.need !== 'mandatory' && chance.odds(0.35)
    if (cell.kind === 'tick') readings[cell.key] = chance.odds(0.9)
    else if (cell.kind === 'signature') readings[cell.key] = cell.need === 'mandatory' || chance.odds(0.4)
    else if (cell.kind === 'line') readings[cell.key] = null
    if (!isComb(cell)) continue
    const unit = cell.scale && readings[cell.scale.by]
    const scale = (typeof unit === 'string' && cell.scale?.factors[unit]) || 1
    if (blank) readings[cell.key] = null
    else if (cell.kind === 'time') readings[cell.key] = clock(chance.whole(6 * 60, 18 * 60))
    else if (cell.kind === 'date')
      readings[cell.key] = `2026-${String(chance.whole(1, 11)).padStart(2, '0')}-${String(chance.whole(1, 28)).padStart(2, '0')}`
    else readings[cell.key] = cell.register ? chance.whole(1, 9999) : numberFor(cell, chance, scale)
  }
  return readings
}

type Readings = Record<string, Written>
const sum = (readings: Readings, keys: readonly string[]) => keys.reduce((total, key) => total + Number(readings[key] ?? 0), 0)

/** Works a tie out: the result is what the parts say, or nothing where it does not fit its boxes. */
function tieUp(readings: Readings, tie: Tie, layout: Layout): void {
  const result = (key: string, value: number) => {
    const cell = layout.cells.find((c) => c.key === key)
    if (!cell || !isComb(cell)) return
    const rounded = toPlaces(value, placesOf(cell))
    readings[key] = Number.isFinite(rounded) && rounded >= 0 && rounded <= largest(cell) ? rounded : null
  }
  if (tie.kind === 'balance') result(tie.equals, sum(readings, tie.plus) - sum(readings, tie.minus))
  else if (tie.kind === 'mean') {
    const written = tie.of.filter((key) => typeof readings[key] === 'number')
    result(tie.equals, sum(readings, written) / written.length)
  } else if (tie.kind === 'order') {
    const written = tie.keys.filter((key) => typeof readings[key] === 'string')
    const times = written.map((key) => String(readings[key])).sort()
    written.forEach((key, i) => {
      readings[key] = times[i]!
    })
  } else if (tie.kind === 'not-less' && Number(readings[tie.greater]) < Number(readings[tie.less])) {
    const greater = readings[tie.greater]!
    readings[tie.greater] = readings[tie.less]!
    readings[tie.less] = greater
  }
}

/** A scenario for any layout; the tillage sheet has one that a farmer would believe. */
export function scenarioFor(layout: Layout, chance: Chance): Scenario {
  if (layout.key === 'tillage') return tillageScenario(chance)
  const readings = draw(layout, chance)
  for (const tie of layout.ties) tieUp(readings, tie, layout)
  return { readings, spoiled: [], wrongSum: [] }
}
