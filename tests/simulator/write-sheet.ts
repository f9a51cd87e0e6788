/** Fills a printed sheet by hand: the ink layer, and what exactly was written. */
import { type Box, boxesOf, cellBounds } from '../../shared/layouts/geometry.ts'
import { type ChoiceCell, type CombCell, isComb, type Layout, type TickCell } from '../../shared/layouts/layout.ts'
import { boxDigits } from './boxes.ts'
import type { Digits } from './digits.ts'
import type { InkLayer } from './ink.ts'
import type { Chance } from './random.ts'
import type { Scenario } from './scenario.ts'
import { crossSeven, drawTickMark, scribble, sign, strikeThrough, strikeWide, writeWords } from './strokes.ts'
import { writeDigit } from './write-digit.ts'
import type { Writer } from './writer.ts'

export interface Desk {
  ink: InkLayer
  digits: Digits
  writer: Writer
  chance: Chance
}

/**
 * Writes every cell of the scenario. A spoiled cell changes the scenario where its value goes with the ink: a comb crossed out
 * and not written again holds nothing.
 */
export function writeSheet(desk: Desk, layout: Layout, scenario: Scenario): void {
  const { writer, chance } = desk
  for (const cell of layout.cells) {
    const value = scenario.readings[cell.key]
    if (value === undefined) continue
    const spoiled = scenario.spoiled.includes(cell.key)
    if (isComb(cell)) writeComb(desk, layout, cell, scenario, spoiled)
    else if (cell.kind === 'tick') {
      writeTick(desk, cell, value === true, spoiled)
      if (spoiled) scenario.readings[cell.key] = false
    } else if (cell.kind === 'choice') writeChoice(desk, cell, value, spoiled)
    else if (cell.kind === 'signature' && value === true) sign(desk.ink, boxesOf(cell)[0]!, writer.pen, chance)
    else if (cell.kind === 'line' && chance.odds(0.35)) writeWords(desk.ink, boxesOf(cell)[0]!, writer.pen, chance)
  }
}

function scaleOf(cell: CombCell, scenario: Scenario): number {
  if (!cell.scale) return 1
  const unit = scenario.readings[cell.scale.by]
  return (typeof unit === 'string' && cell.scale.factors[unit]) || 1
}

function writeComb(desk: Desk, layout: Layout, cell: CombCell, scenario: Scenario, spoiled: boolean): void {
  const { ink, digits, writer, chance } = desk
  const zero = writer.leading === 'zero' || (writer.leading === 'mixed' && chance.odds(0.4)) || cell.register !== undefined
  const boxes = boxesOf(cell)
  const written = boxDigits(cell, scenario.readings[cell.key]!, scaleOf(cell, scenario), zero)
  const put = (box: Box, digit: number) => {
    writeDigit(ink, box, digits.draw(digit, chance), writer, chance)
    if (digit === 7 && writer.crossesSevens) crossSeven(ink, box, writer.pen, chance)
  }
  const fill = () =>
    written.forEach((digit, i) => {
      if (digit !== null) put(boxes[i]!, digit)
    })
  if (!spoiled) {
    fill()
    return
  }
  const inked = new Map(boxes.flatMap((box, i) => (typeof written[i] === 'number' ? [[box, written[i]] as const] : [])))
  const beside = besideBoxes(layout, cell)
  const correct =
    beside &&
    (() =>
      written.forEach((digit, i) => {
        if (digit !== null) put(beside[i]!, digit)
      }))
  spoilComb(desk, cell, inked, fill, put, correct, scenario)
}

/** Room right of a comb for the value written again, a little smaller, or null where another cell or a mark stands there. */
function besideBoxes(layout: Layout, cell: CombCell): Box[] | null {
  const own = cellBounds(cell)
  const width = own.width * 0.8
  const room = { x: own.x + own.width + 1.6, y: own.y - 0.4, width, height: own.height + 0.8 }
  const taken = [...layout.cells.map(cellBounds), ...layout.squares.map((s) => ({ ...s, width: s.size, height: s.size }))]
  const meets = (b: Box) =>
    b.x - 3 < room.x + room.width && b.x + b.width > room.x && b.y < room.y + room.height && b.y + b.height > room.y
  if (room.x + room.width > layout.page.width - 8 || taken.some((b) => meets(b))) return null
  const boxes = boxesOf(cell)
  const step = width / boxes.length
  return boxes.map((b, i) => ({ ...b, x: room.x + i * step, width: step }))
}

/** One way of going wrong in a comb. */
function spoilComb(
  { ink, writer, chance }: Desk,
  cell: CombCell,
  inked: ReadonlyMap<Box, number>,
  fill: () => void,
  put: (box: Box, digit: number) => void,
  correct: (() => void) | null,
  scenario: Scenario,
): void {
  const way = chance.pick(['struck', 'struck', 'struck', 'one struck', 'scribbled', 'two in a box', 'written over'] as const)
  const places = [...inked.keys()]
  const one = chance.pick(places)
  fill()
  if (way === 'struck') {
    const [first, last] = [places[0]!, places.at(-1)!]
    strikeThrough(ink, { ...first, width: last.x + last.width - first.x }, writer.pen, chance)
    if (!(correct && chance.odds(0.6))) scenario.readings[cell.key] = null
    else correct()
  } else if (way === 'one struck') {
    strikeThrough(ink, one, writer.pen, chance)
    scenario.readings[cell.key] = null
  } else if (way === 'scribbled') {
    scribble(ink, one, writer.pen, chance)
    scenario.readings[cell.key] = null
  } else if (way === 'two in a box') {
    const half = { ...one, width: one.width * 0.55 }
    put({ ...half, x: one.x + one.width * 0.45 }, chance.whole(0, 9))
    scenario.readings[cell.key] = null
  } else {
    // The same digit written twice is no mistake; another over it is.
    put(one, chance.pick([0, 1, 2, 3, 4, 5, 6, 7, 8, 9].filter((digit) => digit !== inked.get(one))))
    scenario.readings[cell.key] = null
  }
}

function writeTick({ ink, writer, chance }: Desk, cell: TickCell, ticked: boolean, spoiled: boolean): void {
  const box = boxesOf(cell)[0]!
  if (ticked || spoiled) drawTickMark(ink, box, writer, chance)
  if (!spoiled) return
  // One short line through a cross is only another cross: a hand that takes a tick back blackens it or crosses it out wide.
  if (chance.odds(0.5)) scribble(ink, box, writer.pen, chance)
  else strikeWide(ink, box, writer.pen, chance)
}

function writeChoice({ ink, writer, chance }: Desk, cell: ChoiceCell, value: unknown, spoiled: boolean): void {
  const boxes = boxesOf(cell)
  const chosen = boxes.find((b) => b.option === value)
  if (chosen) drawTickMark(ink, chosen, writer, chance)
  if (!spoiled) return
  const other = chance.pick(boxes.filter((b) => b !== chosen))
  drawTickMark(ink, other, writer, chance)
  scribble(ink, other, writer.pen, chance)
}
