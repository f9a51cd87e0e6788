import { createHash } from 'node:crypto'
import { expect, test } from 'vitest'
import { describeLayout } from '../../shared/layouts/geometry.ts'
import type { Layout } from '../../shared/layouts/layout.ts'
import { LAYOUTS } from '../../shared/layouts/registry.ts'

/** Where everything the reader looks for stands. */
const geometryOf = (layout: Layout) => {
  const { code, codes, squares, planBlock } = layout
  const cells = describeLayout(layout).cells.map(({ key, kind, format, boxes }) => ({ key, kind, format, boxes }))
  return createHash('sha256').update(JSON.stringify({ code, codes, squares, planBlock, cells })).digest('hex').slice(0, 16)
}

/** Sheets of these are in people's hands. A new version gets a line of its own; no line ever changes. */
const PRINTED: Readonly<Record<string, string>> = {
  'tillage 1': '12dc20b10fc40db2',
  'haulage 1': '426fab22b8135067',
}

test.each(LAYOUTS)('$key $version: a printed sheet keeps its geometry for ever', (layout) => {
  expect(geometryOf(layout)).toBe(PRINTED[`${layout.key} ${layout.version}`])
})
