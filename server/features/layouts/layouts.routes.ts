import { z } from 'zod'
import { UserError } from '../../../shared/errors.ts'
import { describeLayout } from '../../../shared/layouts/geometry.ts'
import type { Layout } from '../../../shared/layouts/layout.ts'
import { findLayout, LAYOUTS } from '../../../shared/layouts/registry.ts'
import { type Route, route } from '../../http/route.ts'
import { sendFile } from '../../http/send-file.ts'
import { freshCode } from '../demonstrations/plan-trials.ts'

const params = z.object({ key: z.string().max(40) })
const CSV = 'text/csv; charset=utf-8'
const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet'

/** @throws UserError `not_found` */
function getLayout(key: string): Layout {
  const layout = findLayout(key)
  if (!layout) throw new UserError('not_found', `There is no layout "${key.slice(0, 40)}".`)
  return layout
}

/** A file made from a layout; its writer is loaded when first asked for. */
function fileRoute(ending: string, summary: string, type: string, write: (layout: Layout) => Promise<Buffer | string>): Route {
  return route({
    method: 'get',
    path: `/layouts/:key/${ending}`,
    summary,
    access: 'signed in',
    params,
    handle: async ({ params: { key }, res }) => {
      const layout = getLayout(key)
      const bytes = Buffer.from(await write(layout))
      sendFile(res, { type, name: `${layout.key}-${layout.version}-${ending}`, bytes, show: type === 'application/pdf' })
    },
  })
}

export const layoutRoutes: Route[] = [
  route({
    method: 'get',
    path: '/layouts',
    summary: 'The layouts there are',
    access: 'signed in',
    scope: 'book',
    response: z.array(z.object({ key: z.string(), version: z.number().int(), title: z.string() })),
    handle: () => LAYOUTS.map(({ key, version, title }) => ({ key, version, title })),
  }),
  route({
    method: 'get',
    path: '/layouts/:key',
    summary: 'The geometry of a layout in millimetres',
    access: 'signed in',
    scope: 'book',
    params,
    response: z.record(z.string(), z.unknown()),
    handle: ({ params: { key } }) => ({ ...describeLayout(getLayout(key)) }),
  }),
  fileRoute('blank.pdf', 'A blank sheet with a fresh code', 'application/pdf', async (layout) => {
    const { printSheets } = await import('../../print/sheet-pdf.ts')
    return printSheets([{ layout, sheetCode: freshCode(), plan: null }])
  }),
  fileRoute('form.xlsx', 'The layout as a workbook to fill', XLSX, async (layout) => {
    const { writeFormXlsx } = await import('../../print/form-xlsx.ts')
    return writeFormXlsx(layout)
  }),
  fileRoute('form.csv', 'The layout as a CSV file to fill', CSV, async (layout) => {
    const { writeFormCsv } = await import('../../print/form-csv.ts')
    return writeFormCsv(layout)
  }),
  fileRoute('dictionary.csv', 'Keys, units, formats and limits of a layout', CSV, async (layout) => {
    const { writeDictionary } = await import('../../print/dictionary.ts')
    return writeDictionary(layout)
  }),
]
