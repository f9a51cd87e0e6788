/** Mistakes made on purpose: results the writer got wrong, and cells spoiled in writing. */
import { isComb, type Layout } from '../../shared/layouts/layout.ts'
import type { Chance } from './random.ts'
import { type Scenario, toPlaces } from './scenario.ts'

const SLIPS: ReadonlyArray<number> = [-100, 100, -20, 20, -10, 10, 40, -5, 7]

/**
 * Makes one result that the layout ties to others wrong, as a slip in adding does: by a digit of the first three that are
 * written, and by more than the rules let pass as rounding (a hundredth, and the last written place).
 */
export function makeWrongSum(scenario: Scenario, layout: Layout, chance: Chance): void {
  const results = layout.ties.flatMap((tie) => ('equals' in tie ? [tie.equals] : []))
  const able = layout.cells.filter(isComb).filter((c) => results.includes(c.key) && typeof scenario.readings[c.key] === 'number')
  if (able.length === 0) return
  const cell = chance.pick(able)
  const right = scenario.readings[cell.key] as number
  const places = cell.format.includes('.') ? cell.format.length - cell.format.indexOf('.') - 1 : 0
  const step = 10 ** (Math.floor(Math.log10(Math.max(right, 1e-3))) - 2)
  const slip = chance.pick(SLIPS) * step
  const wrong = toPlaces(right + slip, places)
  const high = Number(cell.format)
  const noticed = Math.abs(wrong - right) > Math.max(0.02 * right, 2 * 10 ** -places)
  if (wrong <= 0 || wrong > high || !noticed) return
  scenario.readings[cell.key] = wrong
  scenario.wrongSum.push(cell.key)
}

/** Chooses written cells to spoil; how each is spoiled is decided when it is written. */
export function chooseSpoiled(scenario: Scenario, layout: Layout, count: number, chance: Chance): void {
  const able = layout.cells.filter((cell) => {
    const value = scenario.readings[cell.key]
    if (value === undefined || scenario.wrongSum.includes(cell.key)) return false
    return (isComb(cell) && value !== null) || cell.kind === 'choice' || cell.kind === 'tick'
  })
  const combs = able.filter(isComb)
  const marks = able.filter((c) => !isComb(c))
  for (let i = 0; i < count; i += 1) {
    const cell = chance.odds(0.85) ? chance.pick(combs) : chance.pick(marks)
    if (cell && !scenario.spoiled.includes(cell.key)) scenario.spoiled.push(cell.key)
  }
}
