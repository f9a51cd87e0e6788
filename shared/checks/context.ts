/** What every rule may look at: the readings, what registers know, and the results before any stop. */
import { type Run, runOf, type Stop, stopsOf, type Times, timesOf } from '../trial/clock.ts'
import { computeResults } from '../trial/compute-results.ts'
import { type Facts, factsWithReadings, type Kit, kitOf } from '../trial/facts.ts'
import type { Measure } from '../trial/measure.ts'
import { measureFuel } from '../trial/measure-fuel.ts'
import { measurePlot, type Plot } from '../trial/measure-plot.ts'
import { indexes, numberAt, type Readings, type Repeat, repeats, textAt } from '../trial/readings.ts'
import type { Results } from '../trial/result.ts'
import { type CellInfo, cellWithoutLayout } from './cells.ts'
import { LIMITS, type LimitName } from './limits.ts'
import { leading } from './text.ts'

/** One box a character of the comb, as read: null is an empty box. */
export type Boxes = readonly (string | null)[]

export interface CheckOptions {
  /** What the layout says of its cells, by key. */
  cells?: Readonly<Record<string, CellInfo>>
  /** The combs box by box, where a reader saw them. */
  boxes?: Readonly<Record<string, Boxes>>
  /** Limits for this one question; else those among the facts. */
  limits?: Partial<Record<LimitName, number>>
}

export interface CheckContext {
  readings: Readings
  facts: Facts
  kit: Kit
  results: Results
  /** C01 as it stands, also when it is not positive. */
  fuel: Measure
  plot: Plot
  run: Run
  times: Times | null
  stops: readonly Stop[]
  boxes: Readonly<Record<string, Boxes>>
  number: (key: string) => number | null
  text: (key: string) => string | null
  all: (stem: string) => Repeat[]
  /** Cells of a stem that are on the sheet, filled or not. */
  keys: (stem: string) => string[]
  /** The name of a cell, to begin a sentence with. */
  label: (key: string) => string
  cell: (key: string) => CellInfo
  limit: (name: LimitName) => number
  /** Cells the fuel figure came from, by what is filled. */
  fuelCells: string[]
}

export function contextOf(readings: Readings, handedFacts: Facts, options: CheckOptions): CheckContext {
  const facts = factsWithReadings(readings, handedFacts)
  const run = runOf(readings)
  const fuel = measureFuel(readings, facts)
  const limit = (name: LimitName) => options.limits?.[name] ?? facts.limits?.[name] ?? LIMITS[name].value
  const cell = (key: string) => options.cells?.[key] ?? cellWithoutLayout(key)
  return {
    readings,
    facts,
    kit: kitOf(facts),
    results: computeResults(readings, facts, { ptoShare: limit('pto_share_of_rated') }),
    fuel,
    plot: measurePlot(readings, facts),
    run,
    times: timesOf(readings),
    stops: stopsOf(readings, run),
    boxes: options.boxes ?? {},
    number: (key) => numberAt(readings, key),
    text: (key) => textAt(readings, key),
    all: (stem) => repeats(readings, stem),
    keys: (stem) => (readings[stem] !== undefined ? [stem] : indexes(readings, stem).map((n) => `${stem}[${n}]`)),
    label: (key) => leading(cell(key).label),
    cell,
    limit,
    fuelCells: fuel.cells,
  }
}
