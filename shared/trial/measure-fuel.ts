/** Fuel used as a measure, from the levels and fillings on the sheet. */
import { type Facts, kitAssumptions, kitOf } from './facts.ts'
import { fuelAt15, fuelUsed } from './fuel.ts'
import { type Known, known, lacking, type Measure, type Part } from './measure.ts'
import { measureDensity } from './measure-density.ts'
import { ml, quantity } from './quantity.ts'
import { isBlank, numberAt, type Readings, type Repeat, repeats, textAt } from './readings.ts'
import { jarStep_ml, rectangularU, SPREAD, stepDifferenceU, stepU } from './uncertainty.ts'
import { expansion, volumeCorrection } from './volume-correction.ts'

const LEVELS = ['jar_start_ml', 'jar_end_ml'] as const

interface Balance {
  start: number
  end: number
  topups: Repeat[]
  cells: string[]
}

/** C01 with its budget (level difference, or refilled to the same line). */
export function measureFuel(readings: Readings, facts: Facts): Measure {
  const balance = balanceOf(readings)
  if ('known' in balance) return balance
  const used = fuelUsed(
    ml(balance.start),
    balance.topups.map((t) => ml(t.value)),
    ml(balance.end),
  )
  return known(used, balance.cells, fuelParts(balance, readings, facts), kitAssumptions(facts))
}

function balanceOf(readings: Readings): Balance | Measure {
  const topups = repeats(readings, 'topup_ml')
  const cells = [...LEVELS, ...topups.map((t) => t.key)]
  if (textAt(readings, 'fuel_method') === 'W') {
    return lacking('not_on_sheet', 'Fuel measured by weighing: this sheet holds no masses.', ['fuel_method', ...cells])
  }
  // Refilled to the same line the jar's two levels are one, and need not be written.
  const refilled =
    textAt(readings, 'fuel_method') === 'L' && topups.length > 0 && LEVELS.every((key) => readings[key] === undefined)
  if (refilled) return { start: 0, end: 0, topups, cells: topups.map((t) => t.key) }
  const start = numberAt(readings, 'jar_start_ml')
  const end = numberAt(readings, 'jar_end_ml')
  if (start === null || end === null) {
    const missing = LEVELS.filter((key) => numberAt(readings, key) === null)
    return lacking(
      missing.some((key) => isBlank(readings, key)) ? 'blank' : 'not_on_sheet',
      `No fuel figure without ${missing.map(inWords).join(' and ')}.`,
      cells,
    )
  }
  return { start, end, topups, cells }
}

const inWords = (key: (typeof LEVELS)[number]) =>
  key === 'jar_start_ml' ? 'the jar level at the start' : 'the jar level at the end'

/** JCGM 100 budget: reading the jar, filling the jug, and the scales of both, which do not average out. */
function fuelParts(balance: Balance, readings: Readings, facts: Facts): Part[] {
  const kit = kitOf(facts)
  const { start, end, topups } = balance
  const poured = topups.reduce((sum, t) => sum + t.value, 0)
  const sameLine = textAt(readings, 'fuel_method') === 'L'
  const isFull = (t: Repeat) => sameLine && t.value === kit.jugCapacity_ml
  const full = topups.filter(isFull).length
  const fills = Math.hypot(
    Math.sqrt(full) * rectangularU(SPREAD.lineSetting_ml),
    Math.sqrt(topups.length - full) * stepU(kit.jugMark_ml),
  )
  const jar = sameLine ? 2 * SPREAD.lineSetting_ml : jarStep_ml([start, end], kit.jarMark_ml)
  const scale = kit.kitScale_pct / 100
  return [
    { name: sameLine ? 'setting the jar to its line' : 'reading the jar', u: stepDifferenceU(jar) },
    { name: 'filling the jug', u: fills },
    { name: 'scale of the jar', u: rectangularU(scale * Math.abs(start - end)) },
    { name: 'scale of the jug', u: rectangularU(scale * poured) },
  ]
}

/** C02: the same fuel at 15 °C; needs the temperature of every level and the density. */
export function measureFuelAt15(readings: Readings, facts: Facts): Measure {
  const balance = balanceOf(readings)
  if ('known' in balance) return balance
  const density = measureDensity(readings, facts)
  if (!density.known) return { ...density, cells: [...balance.cells, ...density.cells] }
  const pairs = [
    { key: 'fuel_temp_start_c', volume: balance.start, sign: 1 },
    ...balance.topups.map((t) => ({ key: `topup_temp_c[${t.n}]`, volume: t.value, sign: 1 })),
    { key: 'fuel_temp_end_c', volume: balance.end, sign: -1 },
  ]
  const cells = [...balance.cells, ...pairs.map((p) => p.key), ...density.cells]
  const levels = pairs.map((pair) => ({ ...pair, temp_c: numberAt(readings, pair.key) }))
  const cold = levels.find((level) => level.temp_c === null)
  if (cold) return lacking('blank', 'A fuel temperature is missing: each level is corrected at its own.', cells)
  const rho = quantity(density.value, 'kg/m3')
  const warm = levels.map((level) => ({ volume: ml(level.volume), temp_c: level.temp_c ?? 15 }))
  const [first, ...rest] = warm
  const last = rest.pop()
  if (!first || !last) return lacking('blank', 'No jar levels.', cells)
  const value = fuelAt15(first, rest, last, rho)
  const factor = volumeCorrection(rho, last.temp_c)
  const parts = fuelParts(balance, readings, facts).map((part) => ({ ...part, u: part.u * factor }))
  const heat = Math.hypot(...warm.map((level) => level.volume * expansion(rho) * stepU(SPREAD.thermometerStep_c)))
  return known(value, cells, [...parts, { name: 'fuel temperature', u: heat }], kitAssumptions(facts))
}

/** The jar levels to expect just before each top-up, mL, taking the burning as even; [] where clock or levels are missing. */
export function levelsBeforeTopups(
  readings: Readings,
  used: Known,
  sinceStart: (text: string | null) => number | null,
  length_min: number,
): Array<{ topup: Repeat; level_ml: number; timeKey: string }> {
  let filled = numberAt(readings, 'jar_start_ml')
  if (filled === null || length_min <= 0) return []
  const found: Array<{ topup: Repeat; level_ml: number; timeKey: string }> = []
  for (const topup of repeats(readings, 'topup_ml')) {
    const timeKey = `topup_t[${topup.n}]`
    const at = sinceStart(textAt(readings, timeKey))
    if (at !== null) found.push({ topup, level_ml: filled - (used.value * at) / length_min, timeKey })
    filled += topup.value
  }
  return found
}
