/** Mistakes made on purpose: results the writer got wrong, and cells spoiled in writing. */
import { isComb, type Layout } from '../../shared/layouts/layout.ts'
import type { Chance } from './random.ts'
import { type Scenario, toPlaces } from './scenario.ts'

/** Results worked out by hand, and by how much a slip of the head moves them. */
const BY_HAND: ReadonlyArray<{ key: string; places: number; slips: readonly number[] }> = [
  { key: 'fuel_used_written_ml', places: 0, slips: [-1000, 1000, -200, 200, -100, 100, 400] },
  { key: 'depth_mean_written_cm', places: 1, slips: [-1, 1, -0.4, 0.5, 0.2] },
  { key: 'width_mean_written_m', places: 3, slips: [-0.1, 0.1, 0.01, -0.02, 0.008] },
  { key: 'l_per_ha_written', places: 2, slips: [-1, 1, 2.5, -0.6, 0.5] },
  { key: 'area_written', places: 3, slips: [0.1, -0.05, 0.04, 0.02] },
]

/** Makes one written result wrong: a slip in adding, or two digits changed round. */
export function makeWrongSum(scenario: Scenario, chance: Chance): void {
  const able = BY_HAND.filter(({ key }) => typeof scenario.readings[key] === 'number')
  if (able.length === 0) return
  const { key, places, slips } = chance.pick(able)
  const right = scenario.readings[key] as number
  const relative = key === 'area_written' ? 0.035 * right : 0
  const wrong = toPlaces(right + chance.pick(slips) + Math.sign(chance.unit() - 0.5) * relative, places)
  if (wrong <= 0 || wrong === right) return
  scenario.readings[key] = wrong
  scenario.wrongSum.push(key)
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
