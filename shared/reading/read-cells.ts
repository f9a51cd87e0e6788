/** From a placed page to readings: every field cut through its own map, recognised, and weighed together. */
import { type Box, cellBounds, unitOf } from '../layouts/geometry.ts'
import { isComb, type Layout, type LayoutCell } from '../layouts/layout.ts'
import type { Alignment, PlacedPart } from './align/align-page.ts'
import { tickContrast } from './align/measure-tick.ts'
import type { Picture } from './align/patch.ts'
import { isPlaced } from './align/trace-rules.ts'
import { blackAt } from './cells/black-level.ts'
import { cutCell, samplesFor } from './cells/cut.ts'
import { inkWithin, signedBy } from './cells/signed.ts'
import { fading, isVisible, leftOpen, usualContrast } from './cells/tick-print.ts'
import { measureTick, tickDist, tickHabit } from './cells/ticks.ts'
import { type BoxDist, boxDist, CELL_PX, type DigitNet, type TickDist } from './classes.ts'
import { scaleAt } from './geometry/homography.ts'
import { type FieldMap, fieldToPhoto } from './geometry/page-map.ts'
import { ResidualField } from './geometry/residual-field.ts'
import type { CellReading } from './sheet-reading.ts'
import { weighSheet } from './weigh/sheet.ts'
import type { Facts, Weighed } from './weigh/types.ts'

interface Watch {
  lap: (stage: string) => void
}

/** A field farther than this from its neighbours' word is shown to a person, whatever the net says. */
const FIT_LIMIT_MM = 0.6

interface PlacedBox {
  box: Box
  map: FieldMap
}

interface PlacedCell {
  cell: LayoutCell
  boxes: PlacedBox[]
  /** Null where a box was not found on its own lines. */
  fit_mm: number | null
  hasFrame: boolean
  /** All of its boxes were seen, or the place of the line under its area is known. */
  seen: boolean
  /** The maps of its left and its right end. */
  ends: readonly [FieldMap, FieldMap]
}

export async function readCells(
  picture: Picture,
  alignment: Alignment,
  layout: Layout,
  planned: boolean,
  net: DigitNet,
  facts: Facts,
  watch: Watch,
): Promise<Map<string, CellReading>> {
  const placed = placeCells(alignment, layout, planned)
  const combs = placed.filter((p) => isComb(p.cell))
  const boxes = combs.flatMap((p) => p.boxes)
  const cells = new Float32Array(boxes.length * CELL_PX)
  const over = samplesFor((picture.shrunk ?? 1) * scaleAt(alignment.homography, layout.page.width / 2, layout.page.height / 2))
  boxes.forEach(({ box, map }, i) => {
    cutCell(picture, map, box, blackAt(alignment.blacks, box), over, cells, i)
  })
  watch.lap('cut')
  const probabilities = await net.classify(cells, boxes.length)
  watch.lap('net')
  const combInk = new Map<string, BoxDist[]>()
  let next = 0
  for (const { cell, boxes: own } of combs)
    combInk.set(
      cell.key,
      own.map(() => boxDist(probabilities, next++)),
    )
  const { ticks, hidden } = readTicks(picture, alignment, placed)
  watch.lap('ticks')
  const weighed = weighSheet(layout, { combs: combInk, ticks }, facts)
  watch.lap('weigh')
  const readings = placed.map((p): [string, CellReading] => {
    const own = weighed.get(p.cell.key) ?? seen(picture, alignment, p)
    return [p.cell.key, withPlace(p, own, hidden.has(p.cell.key))]
  })
  watch.lap('ticks')
  return new Map(readings)
}

/** The chances of each tick box, and the cells with a box whose print hardly shows. */
function readTicks(picture: Picture, alignment: Alignment, placed: readonly PlacedCell[]) {
  const own = placed.filter(({ cell }) => cell.kind === 'tick' || cell.kind === 'choice')
  const all = own.flatMap(({ cell, boxes }) =>
    boxes.map(({ box, map }) => ({ key: cell.key, box, map, contrast: tickContrast(picture, map, box) })),
  )
  const usual = usualContrast(all.map((b) => b.contrast))
  const inks = all.map(({ box, map, contrast }) =>
    measureTick(picture, map, box, blackAt(alignment.blacks, box) * fading(contrast, usual)),
  )
  const habit = tickHabit(inks)
  const ticks = new Map<string, TickDist[]>(own.map(({ cell }) => [cell.key, []]))
  const hidden = new Set<string>()
  all.forEach(({ key, contrast }, i) => {
    const dist = tickDist(inks[i]!, habit)
    const visible = isVisible(contrast, usual)
    if (!visible) hidden.add(key)
    ticks.get(key)!.push(visible ? dist : leftOpen(dist))
  })
  return { ticks, hidden }
}

function placeCells(alignment: Alignment, layout: Layout, planned: boolean): PlacedCell[] {
  const byKey = new Map<string, PlacedPart[]>()
  for (const placed of alignment.parts) byKey.set(placed.part.key, [...(byKey.get(placed.part.key) ?? []), placed])
  const { homography } = alignment
  const field = new ResidualField(alignment.anchors)
  return layout.cells.flatMap((cell): PlacedCell[] => {
    if (planned && 'planned' in cell && cell.planned) return []
    const parts = byKey.get(cell.key)
    if (parts) {
      const boxes = parts.flatMap(({ part, center, displacement }) =>
        part.boxes.map((box) => ({ box, map: { homography, center, displacement } })),
      )
      const fit_mm = parts.every((p) => p.found) ? Math.max(...parts.map((p) => p.fit_mm)) : null
      const ends = [boxes[0]!.map, boxes.at(-1)!.map] as const
      return [{ cell, boxes, fit_mm, hasFrame: true, seen: parts.every((p) => p.seen), ends }]
    }
    const box = cellBounds(cell)
    const mapAt = (x: number): FieldMap => {
      const center = { x, y: box.y + box.height / 2 }
      return { homography, center, displacement: field.at(center) }
    }
    const right = box.x + box.width
    const line = { y: box.y + box.height, left: box.x, right }
    const seen = isPlaced(alignment.anchors, field, line)
    const boxes = [{ box, map: mapAt(box.x + box.width / 2) }]
    return [{ cell, boxes, fit_mm: null, hasFrame: false, seen, ends: [mapAt(box.x), mapAt(right)] }]
  })
}

/** Signatures are seen; lines of writing stay pictures. */
function seen(picture: Picture, alignment: Alignment, { cell, boxes, seen: framed }: PlacedCell): Weighed {
  const { box, map } = boxes[0]!
  if (cell.kind !== 'signature') return { value: null, state: 'clear', candidates: [], reasons: [], posterior: 1 }
  const { signed, sure: plain, hidden } = signedBy(inkWithin(picture, map, box, blackAt(alignment.blacks, box)))
  const sure = plain && framed
  const text =
    hidden || !framed
      ? `The printed line for ${cell.label} hardly shows in the photo, so a signature might not show either.`
      : `Whether ${cell.label} signed is not plain.`
  const reasons: Weighed['reasons'] = sure ? [] : [{ rule: 'R06', text, cells: [cell.key] }]
  return { value: signed, state: sure ? 'clear' : 'in doubt', candidates: [], reasons, posterior: sure ? 1 : 0.5 }
}

function withPlace({ cell, ends, fit_mm, hasFrame, seen: framed }: PlacedCell, weighed: Weighed, hidden: boolean): CellReading {
  const reading: CellReading = {
    value: weighed.value,
    unit: unitOf(cell),
    state: weighed.state,
    candidates: weighed.candidates,
    reasons: [...weighed.reasons],
    quad: quadOf(cell, ends),
    fit_mm,
  }
  // A field placed by its neighbours alone may lie elsewhere; and bright light takes frame and ink alike, so that nothing shows.
  if (hasFrame && (!framed || fit_mm === null || fit_mm > FIT_LIMIT_MM)) {
    const how =
      fit_mm !== null && framed
        ? `stand ${fit_mm.toFixed(1)} mm from where the boxes around put them`
        : 'were not found, so they may lie elsewhere'
    reading.state = 'in doubt'
    reading.reasons.push({ rule: 'R07', text: `The printed boxes of ${cell.label} ${how}.`, cells: [cell.key] })
  }
  if (hidden) {
    reading.state = 'in doubt'
    const text = `The printed box of ${cell.label} hardly shows in the photo, so ink in it might not show either.`
    reading.reasons.push({ rule: 'R07', text, cells: [cell.key] })
  }
  return reading
}

const tenth = (px: number) => Math.round(px * 10) / 10

function quadOf(cell: LayoutCell, [first, last]: readonly [FieldMap, FieldMap]): Array<[number, number]> {
  const bounds = cellBounds(cell)
  const right = bounds.x + bounds.width
  const bottom = bounds.y + bounds.height
  return [
    fieldToPhoto(first, bounds.x, bounds.y),
    fieldToPhoto(last, right, bounds.y),
    fieldToPhoto(last, right, bottom),
    fieldToPhoto(first, bounds.x, bottom),
  ].map(({ x, y }) => [tenth(x), tenth(y)])
}
