/**
 * What a layout is: the one definition that prints the sheet, makes the spreadsheet form, gives the reader its geometry,
 * draws the desk and validates readings. All lengths are millimetres from the page's top left corner.
 */
import type { Tie } from './tie.ts'

/** mandatory: blank is a doubt or a stop. conditional: needed when its method or event is used. optional: blank says nothing. */
export type Need = 'mandatory' | 'conditional' | 'optional'

export type Register = 'people' | 'places' | 'tractors' | 'implements' | 'kits'

interface CellBase {
  key: string
  /** Words on the sheet, on the desk and in messages. */
  label: string
  /** Words for a sentence, where the printed label leans on what stands beside it ("in work") and says too little alone. */
  said?: string
  need: Need
  /** The section (by its number) the cell stands in; 0 is the head. */
  section: number
}

/** A comb of digit boxes. `x`, `y`: top left of its first box. */
export interface CombCell extends CellBase {
  kind: 'digits' | 'time' | 'date'
  x: number
  y: number
  /** One 9 a box; printed points, colons and hyphens as written: '99.9', '99:99', '99-99-9999'. */
  format: string
  unit: string | null
  instrument?: string
  /** Values outside are impossible (a stop) or unlikely (a doubt), both inclusive, in `unit`. Source: see the rule that reads them. */
  hard?: readonly [number, number]
  plausible?: readonly [number, number]
  /** The digits are multiplied by the factor of the option ticked in `by`. */
  scale?: { by: string; factors: Record<string, number> }
  /** The number names a row of this register. */
  register?: Register
  /** On a planned sheet the plan knows it: it is printed as text, and the boxes are absent. */
  planned?: true
  /** false: printed without its label above (the row or column head says it). */
  labelShown?: false
}

export interface TickCell extends CellBase {
  kind: 'tick'
  x: number
  y: number
  /** false: printed without its label beside it (a column head says it). */
  labelShown?: false
}

export interface ChoiceCell extends CellBase {
  kind: 'choice'
  /** Where its label is printed. none: a text of the layout says it. */
  labelAt: 'above' | 'before' | 'none'
  options: ReadonlyArray<{ option: string; label: string; x: number; y: number }>
}

/** A line of writing or a signature: kept as a picture, never read as digits. */
export interface AreaCell extends CellBase {
  kind: 'line' | 'signature'
  x: number
  y: number
  width: number
  height: number
  /** Shows who a person is: kept apart, and blanked in stored pictures when consent is withdrawn. */
  personal?: true
}

export type LayoutCell = CombCell | TickCell | ChoiceCell | AreaCell

export interface LayoutText {
  x: number
  y: number
  text: string
  size: number
  weight?: 'regular' | 'bold'
  align?: 'left' | 'right' | 'center'
  tone?: 'ink' | 'grey'
}

export interface LayoutRule {
  x1: number
  y1: number
  x2: number
  y2: number
  width: number
}

export interface Layout {
  key: string
  version: number
  /** Two characters that stand for the layout in the corner codes. */
  code: string
  title: string
  subtitle: string
  page: { width: number; height: number }
  /** Corner codes clockwise from the top left; `size` without the quiet zone. */
  codes: ReadonlyArray<{ x: number; y: number; size: number }>
  /** Solid squares along the long edges. */
  squares: ReadonlyArray<{ x: number; y: number; size: number }>
  sections: ReadonlyArray<{ number: number; title: string; hint: string; y: number }>
  cells: ReadonlyArray<LayoutCell>
  texts: ReadonlyArray<LayoutText>
  rules: ReadonlyArray<LayoutRule>
  /** The peg figure of the plot, if the sheet has one. */
  figure?: { x: number; y: number; width: number; height: number }
  /** Where the digits to imitate are drawn. */
  writing?: { x: number; y: number; width: number; height: number }
  /** The typed block of what the plan knows. */
  planBlock: { x: number; y: number; columnWidth: number; columns: number; rows: number; rowHeight: number }
  /** The printed sheet code, right-aligned at x. */
  codeText: { x: number; y: number; size: number }
  /** Which readings the sheet's own arithmetic ties together. */
  ties: ReadonlyArray<Tie>
}

/** Digit boxes and their gaps, as measured for the mock sheet: a comb set one box off must not fit. */
export const BOX = { width: 5.6, height: 7.1, frame: 0.22, pointGap: 1.8, thousandGap: 0.8, bar: 0.6, barRise: 0.8 } as const
export const TICK = { size: 4.2 } as const

export const isComb = (cell: LayoutCell): cell is CombCell =>
  cell.kind === 'digits' || cell.kind === 'time' || cell.kind === 'date'

/** What a sentence or a heading calls the cell, its first letter small. */
export const wordsFor = (cell: LayoutCell): string => cell.said ?? cell.label
