/**
 * npm run sheet -- describe --layout KEY            geometry as JSON on standard output
 * npm run sheet -- print --layout KEY --out FILE    a blank sheet with a fresh code
 */
import { randomInt } from 'node:crypto'
import { writeFile } from 'node:fs/promises'
import { parseArgs } from 'node:util'
import { describeLayout } from '../../shared/layouts/geometry.ts'
import type { Layout } from '../../shared/layouts/layout.ts'
import { findLayout, LAYOUTS } from '../../shared/layouts/registry.ts'
import { formatSheetCode, makeSheetCode } from '../../shared/layouts/sheet-code.ts'
import { printSheets } from '../print/sheet-pdf.ts'

const USAGE = 'usage: npm run sheet -- describe --layout KEY | print --layout KEY --out FILE.pdf'

function fail(message: string): never {
  process.stderr.write(`${message}\n`)
  process.exit(2)
}

function layoutOf(key: string | undefined): Layout {
  const layout = key ? findLayout(key) : null
  return layout ?? fail(`No layout "${key ?? ''}". There are: ${LAYOUTS.map((l) => l.key).join(', ')}. ${USAGE}`)
}

const { values, positionals } = parseArgs({
  options: { layout: { type: 'string' }, out: { type: 'string' } },
  allowPositionals: true,
})

if (positionals[0] === 'describe') {
  process.stdout.write(`${JSON.stringify(describeLayout(layoutOf(values.layout)), null, 1)}\n`)
} else if (positionals[0] === 'print') {
  const layout = layoutOf(values.layout)
  if (!values.out) fail(`Name the file to write. ${USAGE}`)
  const sheetCode = makeSheetCode((below) => randomInt(below))
  await writeFile(values.out, await printSheets([{ layout, sheetCode, plan: null }]))
  process.stdout.write(`${values.out}: ${layout.key} version ${layout.version}, sheet ${formatSheetCode(sheetCode)}\n`)
} else fail(USAGE)
