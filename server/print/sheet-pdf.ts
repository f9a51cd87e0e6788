/** A layout's sheet as PDF: blank, or with what the plan knows printed in the typed block. */
import { boxesOf, cellBounds, layComb } from '../../shared/layouts/geometry.ts'
import { type CombCell, isComb, type Layout, type LayoutCell, TICK } from '../../shared/layouts/layout.ts'
import { formatSheetCode } from '../../shared/layouts/sheet-code.ts'
import { fitValue, type Setting } from './fit-value.ts'
import { finish, GREY, INK, mm, newPage, textAt } from './page.ts'
import { drawFigure, drawMark, drawWriting } from './sheet-decor.ts'
import { drawCodes, drawComb, drawTick } from './sheet-marks.ts'

type Pdf = PDFKit.PDFDocument

/** One line of the typed block, in reading order down the columns. */
export interface PlanLine {
  label: string
  value: string
  /** What stands at the value's ends even where the rest must be cut. */
  ends?: { before: string; after: string }
}

export interface SheetToPrint {
  layout: Layout
  sheetCode: string
  /** What the plan knows; null prints a blank sheet with number boxes instead. */
  plan: readonly PlanLine[] | null
}

/** Prints sheets, one a page. */
export async function printSheets(sheets: readonly SheetToPrint[]): Promise<Buffer> {
  const first = sheets[0]
  if (!first) throw new RangeError('there is no sheet to print')
  const { page } = first.layout
  const pdf = newPage({ title: first.layout.title, width_mm: page.width, height_mm: page.height })
  sheets.forEach((sheet, index) => {
    if (index > 0) pdf.addPage()
    drawSheet(pdf, sheet)
  })
  return finish(pdf)
}

function drawSheet(pdf: Pdf, { layout, sheetCode, plan }: SheetToPrint): void {
  drawCodes(pdf, layout, sheetCode, plan !== null)
  drawHead(pdf, layout, sheetCode)
  drawWriting(pdf, layout)
  drawFigure(pdf, layout)
  for (const section of layout.sections) drawSection(pdf, section)
  for (const rule of layout.rules) {
    pdf.lineWidth(mm(rule.width)).moveTo(mm(rule.x1), mm(rule.y1)).lineTo(mm(rule.x2), mm(rule.y2)).stroke(INK)
  }
  for (const t of layout.texts) {
    textAt(pdf, t.text, t.x, t.y, {
      size: t.size,
      face: t.weight === 'bold' ? 'bold' : 'regular',
      color: t.tone === 'grey' ? GREY : INK,
      align: t.align,
    })
  }
  for (const cell of layout.cells) {
    if (plan && isComb(cell) && cell.planned) continue
    drawCell(pdf, cell)
  }
  if (plan) drawPlan(pdf, layout, plan)
}

function drawHead(pdf: Pdf, layout: Layout, sheetCode: string): void {
  drawMark(pdf, 31, 6.4, 8)
  textAt(pdf, layout.title, 40, 10, { size: 12.5, face: 'bold' })
  textAt(pdf, layout.subtitle, 40, 13.2, { size: 6.4, color: GREY })
  const { x, y, size } = layout.codeText
  const width = textAt(pdf, formatSheetCode(sheetCode), x, y - 1.4, { size, face: 'mono-bold', align: 'right' })
  textAt(pdf, 'sheet', x - width - 2, y - 1.4, { size: 7, color: GREY, align: 'right' })
  pdf.lineWidth(0.8).moveTo(mm(31), mm(14.4)).lineTo(mm(180), mm(14.4)).stroke(INK)
}

function drawSection(pdf: Pdf, section: Layout['sections'][number]): void {
  pdf.lineWidth(1.4).moveTo(mm(14), mm(section.y)).lineTo(mm(196), mm(section.y)).stroke(INK)
  textAt(pdf, String(section.number), 14, section.y + 4, { size: 9, face: 'bold' })
  textAt(pdf, section.title, 18.4, section.y + 4, { size: 9, face: 'bold' })
  textAt(pdf, section.hint, 196, section.y + 3.6, { size: 6.4, color: GREY, align: 'right' })
}

function drawCell(pdf: Pdf, cell: LayoutCell): void {
  if (isComb(cell)) {
    drawComb(pdf, cell)
    if (cell.labelShown === false) return
    drawCombLabel(pdf, cell)
    return
  }
  if (cell.kind === 'tick') {
    drawTick(pdf, cell.x, cell.y)
    if (cell.labelShown !== false) textAt(pdf, cell.label, cell.x + TICK.size + 1.4, cell.y + 3.1, { size: 7.4 })
    return
  }
  if (cell.kind === 'choice') drawChoice(pdf, cell)
  else {
    const box = boxesOf(cell)[0]!
    pdf
      .lineWidth(0.6)
      .moveTo(mm(box.x), mm(box.y + box.height))
      .lineTo(mm(box.x + box.width), mm(box.y + box.height))
      .stroke(INK)
    const below = cell.kind === 'signature'
    textAt(pdf, cell.label, box.x, below ? box.y + box.height + 2.6 : box.y - 1.1, { size: 7, color: below ? GREY : INK })
  }
}

/** The label over the comb's start, the unit over its end, or after the label where both do not fit. */
function drawCombLabel(pdf: Pdf, cell: CombCell): void {
  const { width } = layComb(cell)
  const y = cell.y - 1.1
  const labelWidth = textAt(pdf, cell.label, cell.x, y, { size: 7 })
  const unit = cell.kind === 'date' ? 'day - month - year' : cell.unit
  if (!unit) return
  pdf.font('regular').fontSize(6.6)
  const fits = labelWidth + 1.2 + pdf.widthOfString(unit) / mm(1) <= width
  textAt(pdf, unit, fits ? cell.x + width : cell.x + labelWidth + 1.2, y, {
    size: 6.6,
    color: GREY,
    align: fits ? 'right' : 'left',
  })
}

function drawChoice(pdf: Pdf, cell: Extract<LayoutCell, { kind: 'choice' }>): void {
  for (const option of cell.options) {
    drawTick(pdf, option.x, option.y)
    textAt(pdf, option.label, option.x + TICK.size + 1.2, option.y + 3.1, { size: 7.4 })
  }
  const { x, y } = cellBounds(cell)
  if (cell.labelAt === 'before') textAt(pdf, cell.label, x - 1.4, y + 3.1, { size: 7.4, face: 'bold', align: 'right' })
  if (cell.labelAt === 'above') textAt(pdf, cell.label, x, y - 2.55, { size: 7 })
}

/** Values of the typed block begin here in their column, and end this far before the next one's labels. */
const VALUE_AT_MM = 14
const COLUMN_GAP_MM = 1

function drawPlan(pdf: Pdf, layout: Layout, plan: readonly PlanLine[]): void {
  const { x, y, columnWidth, columns, rows, rowHeight } = layout.planBlock
  const widthOf = (text: string, { face, size }: Setting) => pdf.font(face).fontSize(size).widthOfString(text) / mm(1)
  plan.slice(0, columns * rows).forEach((line, i) => {
    const left = x + Math.floor(i / rows) * columnWidth
    const base = y + (i % rows) * rowHeight + 2
    textAt(pdf, line.label, left, base, { size: 6.6, color: GREY })
    const { text, setting } = fitValue(line, columnWidth - VALUE_AT_MM - COLUMN_GAP_MM, widthOf)
    textAt(pdf, text, left + VALUE_AT_MM, base, setting)
  })
}
