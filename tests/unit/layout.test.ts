import { expect, test } from 'vitest'
import { printSheets } from '../../server/print/sheet-pdf.ts'
import { checkOptions } from '../../shared/checks/judge-sheet.ts'
import { bookColumns } from '../../shared/layouts/book-columns.ts'
import { valueProblem } from '../../shared/layouts/cell-value.ts'
import { formRows } from '../../shared/layouts/form.ts'
import { boxesOf, cellBounds, describeLayout } from '../../shared/layouts/geometry.ts'
import { BOX, isComb, wordsFor } from '../../shared/layouts/layout.ts'
import { LAYOUTS } from '../../shared/layouts/registry.ts'
import { cornerCodeText, makeSheetCode } from '../../shared/layouts/sheet-code.ts'
import { createCodeFinder } from '../../worker/readers/photo/find-codes.ts'
import { tiedKeys } from '../bench/tied.ts'
import { renderPage } from '../simulator/page-render.ts'

/** Lengths are rounded to a micrometre. */
const EPS = 0.002
const sheetCode = makeSheetCode((below) => 11 % below)

test.each(LAYOUTS)('$key $version: every digit box is at least 5.5 x 7 mm and no two cells overlap', (layout) => {
  expect(BOX.width).toBeGreaterThanOrEqual(5.5)
  expect(BOX.height).toBeGreaterThanOrEqual(7)
  const boxes = layout.cells.flatMap((cell) => boxesOf(cell).map((box) => ({ ...box, key: cell.key })))
  for (const [i, a] of boxes.entries()) {
    expect(a.x).toBeGreaterThan(10)
    expect(a.x + a.width).toBeLessThan(layout.page.width - 10)
    for (const b of boxes.slice(i + 1)) {
      const apart =
        a.x + a.width <= b.x + EPS || b.x + b.width <= a.x + EPS || a.y + a.height <= b.y + EPS || b.y + b.height <= a.y + EPS
      expect(apart, `${a.key} and ${b.key}`).toBe(true)
    }
  }
})

test.each(LAYOUTS)('$key $version: cells keep clear of the corner codes, their quiet zone and the squares', (layout) => {
  const quiet = (4 / 21) * layout.codes[0]!.size
  const marks = [
    ...layout.codes.map(({ x, y, size }) => ({ x: x - quiet, y: y - quiet, size: size + 2 * quiet })),
    ...layout.squares,
  ]
  for (const cell of layout.cells) {
    const b = cellBounds(cell)
    for (const m of marks) {
      const apart = b.x + b.width <= m.x || m.x + m.size <= b.x || b.y + b.height <= m.y || m.y + m.size <= b.y
      expect(apart, cell.key).toBe(true)
    }
  }
})

test.each(LAYOUTS)(
  '$key $version: form, checks, downloads and description speak of the same cells, units and formats',
  (layout) => {
    const described = describeLayout(layout).cells
    const keys = layout.cells.map((c) => c.key)
    expect(new Set(keys).size).toBe(keys.length)
    expect(described.map((c) => c.key)).toEqual(keys)
    const personal = new Set(
      layout.cells.filter((c) => c.kind === 'signature' || ('personal' in c && c.personal)).map((c) => c.key),
    )
    expect(formRows(layout).map((r) => r.key)).toEqual(keys.filter((k) => !personal.has(k)))
    const columns = new Map(bookColumns([layout]).map((c) => [c.name, c]))
    const { cells } = checkOptions(layout)
    for (const cell of layout.cells) {
      expect(cells?.[cell.key]?.label).toBe(wordsFor(cell))
      if (!personal.has(cell.key)) expect(columns.get(cell.key)?.unit ?? null).toBe(isComb(cell) ? cell.unit : null)
      if (isComb(cell) && cell.hard) expect(cells?.[cell.key]?.hard).toEqual(cell.hard)
      const row = formRows(layout).find((r) => r.key === cell.key)
      if (row && isComb(cell)) expect([row.unit, row.format]).toEqual([cell.unit, cell.format])
    }
  },
)

test.each(LAYOUTS)('$key $version: no two cells are called the same in a sentence', (layout) => {
  const words = layout.cells.map(wordsFor)
  expect(words.filter((w, i) => words.indexOf(w) !== i)).toEqual([])
})

test.each(LAYOUTS)('$key $version: every tie names cells of the sheet', (layout) => {
  const keys = new Set(layout.cells.map((c) => c.key))
  for (const key of tiedKeys(layout)) expect(keys.has(key), key).toBe(true)
})

test.each(LAYOUTS.flatMap((layout) => [true, false].map((planned) => [layout.key, planned, layout] as const)))(
  'the corner codes of %s are decoded by a program that did not draw them, where the layout puts them (planned: %s)',
  async (_, planned, layout) => {
    const perMm = 300 / 25.4
    const size = { width: Math.round(layout.page.width * perMm), height: Math.round(layout.page.height * perMm) }
    const pdf = await printSheets([{ layout, sheetCode, plan: planned ? [{ label: 'Place', value: '0003 Aspalli' }] : null }])
    const { grey, width, height } = await renderPage(pdf, size)
    // zxing-wasm decodes; the codes were drawn from the modules of the qr package.
    const findCodes = await createCodeFinder()
    const found = await findCodes({ data: grey, width, height })
    const corners = layout.codes.map((place, corner) => {
      const text = cornerCodeText({ layoutCode: layout.code, version: layout.version, corner, planned, sheetCode })
      const code = found.find((f) => f.text === text)
      return code ? Math.hypot(code.corners[0].x / perMm - place.x, code.corners[0].y / perMm - place.y) : Number.NaN
    })
    for (const offset_mm of corners) expect(offset_mm).toBeLessThan(0.5)
  },
)

test('no two layouts share a code: the corners say which sheet it is', () => {
  const codes = LAYOUTS.map(({ code, version }) => `${code}${version}`)
  expect(new Set(codes).size).toBe(LAYOUTS.length)
})

test('a value that does not fit its boxes is refused with a sentence', () => {
  const cell = LAYOUTS[0]!.cells.find((c) => c.key === 'depth_cm[1]')!
  expect(valueProblem(cell, 15.5)).toBeNull()
  expect(valueProblem(cell, 155)).toContain('99.9')
  expect(valueProblem(cell, 15.55)).toContain('decimal')
  expect(cornerCodeText({ layoutCode: 'TI', version: 1, corner: 0, planned: false, sheetCode })).toMatch(/^TI01/)
})
