/** The leaf: one A4 page for the farmer, in words and figures that need no explaining. */
import { formatSheetCode } from '../../shared/layouts/sheet-code.ts'
import type { RecordRow } from '../../shared/schemas/record.ts'
import { roundByUncertainty } from '../../shared/trial/format.ts'
import { type Told, toldOf } from '../../shared/trial/told.ts'
import { drawTape, STRAW, STRAW_PALE } from './leaf-tape.ts'
import { FRAME, finish, GREY, INK, mm, newPage, type TextStyle, textAt } from './page.ts'

type Pdf = PDFKit.PDFDocument

export interface LeafContent {
  row: RecordRow
  run: { plot: string; number: number } | null
  /** null where it is unknown, erased, or not for the reader's eyes. */
  farmerName: string | null
  contact: { name: string; email: string | null }
  enteredAt: Date
  /** Versions of rules and formulas, in words. */
  versions: string
  /** A later version of the record. */
  superseded: { version: number; enteredAt: Date } | null
  /** The version before this one, whose leaf this one takes the place of. */
  replaces: number | null
}

const LEFT = 18
const RIGHT = 192
const MIDDLE = 118

export async function printLeaf(leaf: LeafContent): Promise<Buffer> {
  const { row } = leaf
  const pdf = newPage({ title: `Leaf of record ${row.number}`, width_mm: 210, height_mm: 297 })
  const told = toldOf(row.results, row.implement.operation)
  drawHead(pdf, leaf)
  drawFigure(pdf, told)
  drawTable(pdf, row)
  drawWithWhat(pdf, leaf)
  drawWords(pdf, leaf, told)
  drawFoot(pdf, leaf)
  return finish(pdf)
}

/** A paragraph from y down; gives where the next may begin. */
function paragraph(pdf: Pdf, text: string, x: number, y: number, width: number, style: TextStyle): number {
  pdf
    .font(style.face ?? 'regular')
    .fontSize(style.size)
    .fillColor(style.color ?? INK)
  pdf.text(text, mm(x), mm(y), { width: mm(width), lineGap: style.size * 0.22 })
  return pdf.y / mm(1)
}

const rule = (pdf: Pdf, y: number, width: number, x = LEFT, to = RIGHT) =>
  pdf.lineWidth(mm(width)).moveTo(mm(x), mm(y)).lineTo(mm(to), mm(y)).stroke(INK)

function drawHead(pdf: Pdf, { row, run, farmerName, superseded, replaces }: LeafContent): void {
  textAt(pdf, `${row.tractor.name} with ${row.implement.name}`, LEFT, 22, { size: 17, face: 'bold' })
  const where = [row.place.name, row.trialDate && dayWords(row.trialDate), run && `plot ${run.plot}, run ${run.number}`]
  textAt(pdf, where.filter(Boolean).join(', '), LEFT, 29, { size: 12 })
  if (farmerName) textAt(pdf, `for ${farmerName}`, RIGHT, 22, { size: 12, align: 'right' })
  rule(pdf, 33, 0.9)
  const notice = superseded
    ? `Superseded on ${dayWords(superseded.enteredAt.toISOString())} by version ${superseded.version}: a reading was corrected. Ask for the new leaf.`
    : replaces && `This leaf takes the place of the one with version ${replaces}: a reading was corrected since.`
  if (!notice) return
  pdf
    .rect(mm(LEFT), mm(36), mm(RIGHT - LEFT), mm(9))
    .lineWidth(mm(0.4))
    .fillAndStroke(STRAW_PALE, INK)
  textAt(pdf, notice, LEFT + 3, 41.8, { size: 10.5, face: 'bold' })
}

function drawFigure(pdf: Pdf, { main, refused, sentence }: Told): void {
  if (!main) {
    textAt(pdf, 'No figure for the fuel', LEFT, 66, { size: 34, face: 'bold' })
    paragraph(pdf, `${refused} What was taped and timed stands below.`, LEFT, 74, RIGHT - LEFT, { size: 13 })
    return
  }
  const width = textAt(pdf, main.shown, LEFT - 1, 82, { size: 118, face: 'bold' })
  const x = LEFT + width + 8
  textAt(pdf, main.words, x, 66, { size: 23, face: 'bold' })
  if (main.shownU) {
    const words = `give or take ${main.shownU}`
    pdf.font('bold').fontSize(17)
    const box = pdf.widthOfString(words) / mm(1) + 7
    pdf.rect(mm(x), mm(71), mm(box), mm(11)).lineWidth(mm(0.6)).fillAndStroke(STRAW, INK)
    textAt(pdf, words, x + 3.5, 78.6, { size: 17, face: 'bold' })
  }
  drawTape(pdf, { value: main.value, U: main.U, unit: main.unit, left: LEFT, right: RIGHT, y: 102 })
  if (sentence) paragraph(pdf, `“${sentence}”`, LEFT, 114, RIGHT - LEFT, { size: 13.5 })
}

const ROWS = [
  ['fuel_ml', 'fuel burned', 'mL'],
  ['area_m2', 'area worked', 'm²'],
  ['l_per_ha', 'fuel a hectare', 'L'],
  ['l_per_acre', 'fuel an acre', 'L'],
  ['l_per_h', 'fuel an hour', 'L'],
  ['l_per_100_km', 'fuel a hundred kilometres', 'L'],
  ['l_per_t_km', 'fuel a tonne and kilometre', 'L'],
  ['depth_mean_cm', 'mean depth', 'cm'],
  ['width_mean_m', 'mean width of a pass', 'm'],
  ['speed_km_h', 'speed', 'km/h'],
  ['gross_min', 'from start to end', 'min'],
] as const

function drawTable(pdf: Pdf, { results }: RecordRow): void {
  textAt(pdf, 'What was measured', LEFT, 139, { size: 12, face: 'bold' })
  rule(pdf, 141.5, 0.5, LEFT, MIDDLE - 8)
  let y = 147.5
  for (const [key, label, unit] of ROWS) {
    const result = results[key]
    if (!result || result.value === null) continue
    const { value, U } = roundByUncertainty(result.value, result.U)
    textAt(pdf, label, LEFT, y, { size: 10.5 })
    textAt(pdf, value, LEFT + 62, y, { size: 10.5, face: 'mono-bold', align: 'right' })
    if (U !== null) {
      pdf.rect(mm(LEFT + 63.5), mm(y - 4), mm(19), mm(5.4)).fill(STRAW)
      textAt(pdf, `± ${U}`, LEFT + 65, y, { size: 10.5, face: 'mono' })
    }
    textAt(pdf, unit, LEFT + 84, y, { size: 10.5, color: GREY })
    pdf
      .lineWidth(mm(0.2))
      .moveTo(mm(LEFT), mm(y + 2))
      .lineTo(mm(MIDDLE - 8), mm(y + 2))
      .stroke(FRAME)
    y += 6.6
  }
}

const OF_SOIL: Readonly<Record<string, string>> = { fine: 'fine soil', medium: 'medium soil', coarse: 'coarse soil' }

function drawWithWhat(pdf: Pdf, { row }: LeafContent): void {
  textAt(pdf, 'With what', MIDDLE, 139, { size: 12, face: 'bold' })
  rule(pdf, 141.5, 0.5, MIDDLE, RIGHT)
  const lines = [
    ['tractor', row.tractor.name],
    ['implement', row.implement.name],
    ['gear', row.gear],
    ['soil', row.soilClass && (OF_SOIL[row.soilClass] ?? row.soilClass)],
    ['demonstrator', row.demonstrator.name],
    ['sheet', row.sheetCode && formatSheetCode(row.sheetCode)],
  ] as const
  let y = 147.5
  for (const [label, value] of lines) {
    if (!value) continue
    textAt(pdf, label, MIDDLE, y, { size: 10.5, color: GREY })
    textAt(pdf, value, MIDDLE + 27, y, { size: 10.5, face: label === 'sheet' ? 'mono' : 'regular' })
    y += 6.6
  }
}

function drawWords(pdf: Pdf, { contact, row }: LeafContent, told: Told): void {
  const at = contact.email ? `${contact.name}, ${contact.email}` : contact.name
  const onField = row.results.area_m2?.reason?.code !== 'not_on_sheet'
  const blocks = [
    [
      'What “give or take” means',
      'A jar with marks, a tape and a watch know a figure only so well. The true one lies within give or take about 95 times in 100 (k = 2).',
    ],
    [
      onField ? 'For this field, on this day' : 'For this work, on this day',
      `It says nothing about another day or place. Not tested: ${told.notTested.join(', ')}. One run compares no tractor with another.`,
    ],
    [
      'Who to ask',
      `${at || 'Whoever held the demonstration'}. Every figure leads back to what was written on the sheet that day.`,
    ],
    [
      'If you change your mind',
      'Tell the same person that you withdraw your consent. Name, phone, e-mail and signature are then erased, in the pictures of the sheet too; the readings stay without them.',
    ],
  ] as const
  const below = 226
  rule(pdf, below - 4, 0.9)
  blocks.forEach(([head, text], i) => {
    const x = i % 2 === 0 ? LEFT : LEFT + 90
    const y = below + 2 + Math.floor(i / 2) * 27
    textAt(pdf, head, x, y, { size: 10.5, face: 'bold' })
    paragraph(pdf, text, x, y + 2, 82, { size: 9.5 })
  })
}

function drawFoot(pdf: Pdf, { row, versions, enteredAt }: LeafContent): void {
  rule(pdf, 283, 0.3)
  const text = `record ${row.number}, version ${row.version}, entered ${dayWords(enteredAt.toISOString())}; ${versions}`
  textAt(pdf, text, LEFT, 288, { size: 8.5, color: GREY })
  textAt(pdf, 'Sheafbook', RIGHT, 288, { size: 8.5, face: 'bold', align: 'right' })
}

const MONTHS = 'January February March April May June July August September October November December'.split(' ')

/** "13 October 2026" of an ISO date or moment. */
function dayWords(iso: string): string {
  const [year, month, day] = iso.slice(0, 10).split('-').map(Number)
  return `${day} ${MONTHS[(month ?? 1) - 1]} ${year}`
}
