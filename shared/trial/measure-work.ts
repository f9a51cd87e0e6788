/** Depth, width, speed, slip and time as measures. */
import { runOf, timesOf } from './clock.ts'
import { type Known, known, lacking, type Measure, unwritten } from './measure.ts'
import { metres, seconds } from './quantity.ts'
import { numberAt, type Readings, type Repeat, repeats } from './readings.ts'
import { slipByDistance, slipByTime, slipByTurns } from './slip.ts'
import { speedOverPegs } from './speed.ts'
import { mean, standardDeviation, typeA, variation_pct } from './stats.ts'
import { rectangularU, SPREAD, stepDifferenceU, stepU } from './uncertainty.ts'

const values = (cells: readonly Repeat[]) => cells.map((cell) => cell.value)
const keys = (cells: readonly Repeat[]) => cells.map((cell) => cell.key)

/** Mean depth, cm: scatter, the rule's step, and where the undisturbed surface is. */
export function measureDepth(readings: Readings): Measure {
  const cells = repeats(readings, 'depth_cm')
  if (cells.length === 0)
    return unwritten(readings, ['depth_cm[1]'], { blank: 'No depth is written.', absent: 'This sheet measures no depth.' })
  return known(mean(values(cells)), keys(cells), [
    { name: 'scatter of the depths', u: typeA(values(cells)) ?? 0 },
    { name: 'step of the rule', u: stepU(SPREAD.depthStep_cm) },
    { name: 'undisturbed surface', u: rectangularU(SPREAD.depthSurface_cm) },
  ])
}

/** Mean width, m: its scatter, but never less than one step of the tape (equal readings are no certainty). */
export function measureWidth(readings: Readings): Measure {
  const cells = repeats(readings, 'width_m')
  if (cells.length === 0)
    return unwritten(readings, ['width_m[1]'], { blank: 'No width is written.', absent: 'This sheet measures no width.' })
  const u = Math.max(typeA(values(cells)) ?? 0, stepU(SPREAD.widthStep_m))
  return known(mean(values(cells)), keys(cells), [{ name: 'scatter of the widths', u }])
}

/** s (n − 1) and CV of a repeated reading, without an uncertainty of their own. */
export function measureSpread(readings: Readings, stem: string): { deviation: Measure; variation: Measure } {
  const cells = repeats(readings, stem)
  const s = standardDeviation(values(cells))
  const cv = variation_pct(values(cells))
  const few = unwritten(readings, keys(cells).length > 0 ? keys(cells) : [`${stem}[1]`], {
    blank: 'Fewer than two readings: no spread.',
    absent: 'This sheet has no such readings: no spread.',
  })
  return {
    deviation: s === null ? few : known(s, keys(cells)),
    variation: cv === null ? few : known(cv, keys(cells)),
  }
}

/** C11, km/h: the stopwatch hand is common to the runs and enters once, beside their scatter. */
export function measureSpeed(readings: Readings): Measure {
  const runs = repeats(readings, 'speed_t_s')
  const distance = numberAt(readings, 'speed_dist_m')
  const cells = ['speed_dist_m', ...keys(runs)]
  if (distance === null || runs.length === 0)
    return unwritten(readings, ['speed_dist_m', 'speed_t_s[1]'], {
      blank: 'No speed: the pegged distance or its times are missing.',
      absent: 'This sheet measures no speed.',
    })
  const times = values(runs)
  if (times.some((t) => t <= 0) || distance <= 0) return lacking('impossible', 'A distance or a time of 0 gives no speed.', cells)
  const value = speedOverPegs(metres(distance), times.map(seconds))
  const t = mean(times)
  return known(value, cells, [
    { name: 'scatter of the times', u: (value * (typeA(times) ?? 0)) / t },
    { name: 'hand on the stopwatch', u: (value * rectangularU(SPREAD.reaction_s)) / t },
    { name: 'setting of the pegs', u: (value * SPREAD.peg_m) / distance },
  ])
}

export type SlipMethod = 'C12' | 'C13' | 'C14'

/** Slip by the method whose cells are filled, A before B before C, with its formula. */
export function measureSlip(readings: Readings): { formula: SlipMethod; slip: Measure } {
  if (repeats(readings, 'dist_load_m').length > 0 || repeats(readings, 'dist_noload_m').length > 0)
    return { formula: 'C12', slip: byDistance(readings) }
  if (numberAt(readings, 'rev_load') !== null)
    return { formula: 'C13', slip: byPair(readings, 'rev_load', 'rev_noload', slipByTurns, stepU(0.25)) }
  if (numberAt(readings, 'slip_t_load_s') !== null) {
    const byTime = (a: number, b: number) => slipByTime(seconds(a), seconds(b))
    return { formula: 'C14', slip: byPair(readings, 'slip_t_load_s', 'slip_t_noload_s', byTime, rectangularU(SPREAD.reaction_s)) }
  }
  return {
    formula: 'C12',
    slip: unwritten(readings, ['dist_load_m[1]', 'dist_noload_m[1]'], {
      blank: 'No slip: the ways of the counted wheel turns are missing.',
      absent: 'This sheet measures no slip.',
    }),
  }
}

function byDistance(readings: Readings): Measure {
  const [loaded, unloaded] = [way(readings, 'dist_load_m'), way(readings, 'dist_noload_m')]
  if (!loaded || !unloaded)
    return lacking('blank', 'No slip: the way in work or without load is missing.', ['dist_load_m[1]', 'dist_noload_m[1]'])
  const value = slipByDistance(metres(loaded.value), metres(unloaded.value))
  const [du, dl] = [loaded.parts[0]?.u ?? 0, unloaded.parts[0]?.u ?? 0]
  return known(
    value,
    [...loaded.cells, ...unloaded.cells],
    [
      { name: 'way in work', u: (100 * du) / unloaded.value },
      { name: 'way without load', u: (100 * dl * loaded.value) / unloaded.value ** 2 },
    ],
  )
}

/** Mean way; what one reading of it leaves open covers the scatter, unless the repeats lie further apart. */
function way(readings: Readings, stem: string): Known | null {
  const cells = repeats(readings, stem)
  if (cells.length === 0 || cells.some((cell) => cell.value <= 0)) return null
  return known(mean(values(cells)), keys(cells), [{ name: stem, u: Math.max(SPREAD.wheelWay_m, typeA(values(cells)) ?? 0) }])
}

function byPair(
  readings: Readings,
  loadedKey: string,
  unloadedKey: string,
  slip: (loaded: number, unloaded: number) => number,
  u: number,
): Measure {
  const [loaded, unloaded] = [numberAt(readings, loadedKey), numberAt(readings, unloadedKey)]
  const cells = [loadedKey, unloadedKey]
  if (loaded === null || unloaded === null) return lacking('blank', 'No slip: one of its two counts is missing.', cells)
  if (loaded <= 0 || unloaded <= 0) return lacking('impossible', 'A count of 0 gives no slip.', cells)
  return known(slip(loaded, unloaded), cells, [
    { name: 'count in work', u: (100 * u * unloaded) / loaded ** 2 },
    { name: 'count without load', u: (100 * u) / loaded },
  ])
}

export interface TimeMeasures {
  gross: Measure
  /** T, min: for litres per hour. */
  fuel: Measure
  /** T_f, min: for the capacities. */
  field: Measure
}

/** Times, min: each pair of clock readings taken is a difference of two. */
export function measureTimes(readings: Readings): TimeMeasures {
  const times = timesOf(readings)
  if (times === null) {
    const none = noTime(readings)
    return { gross: none, fuel: none, field: none }
  }
  const clock = (pairs: number) => [{ name: 'clock', u: Math.sqrt(pairs) * stepDifferenceU(times.step_min) }]
  return {
    gross: known(times.gross_min, ['t_start', 't_end'], clock(1)),
    fuel: known(times.fuel_min, times.fuelCells, clock(1 + times.stopsOutOfFuel)),
    field: known(times.field_min, times.fieldCells, clock(1 + times.stopsOutOfField)),
  }
}

function noTime(readings: Readings): Measure {
  const run = runOf(readings)
  if (run.state === 'blank') return lacking('blank', 'No time: start or end is blank.', run.cells)
  if (run.state === 'impossible') return lacking('impossible', 'No time: start and end contradict each other.', run.cells)
  return lacking('impossible', 'No time: a stop with the engine off is half written, or longer than the run.', run.cells)
}
