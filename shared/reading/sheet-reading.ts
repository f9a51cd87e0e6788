/** What reading one picture comes to. */
import type { Layout } from '../layouts/layout.ts'
import type { PageMap } from './geometry/page-map.ts'
import type { TakeAgain } from './locate/take-again.ts'
import type { Candidate, Value } from './weigh/types.ts'

export interface CellReading {
  value: Value
  unit: string | null
  state: 'clear' | 'in doubt'
  candidates: Candidate[]
  reasons: Array<{ rule: string; text: string; cells: string[] }>
  /** Corners in pixels of the upright photo, clockwise from the upper left. */
  quad: Array<[number, number]>
  /** How far the field stands from where its neighbours put it, mm; null where it has no frame or was not found. */
  fit_mm: number | null
}

/** Milliseconds by stage. */
export type Timings = Record<string, number>

export interface SheetReading {
  layout: Layout | null
  sheetCode: string | null
  planned: boolean
  takeAgain: TakeAgain | null
  readings: Map<string, CellReading>
  /** null when the page was not placed. */
  map: PageMap | null
  /** What the placing was like: for the bench and for messages. */
  quality: { px_per_mm: number; edge_mm: number | null; foundShare: number; corners: number; paper: number } | null
  ms: Timings
}
