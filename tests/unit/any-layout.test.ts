/** A layout is made by writing its definition: whatever works with layouts works with each, and knows none by name. */
import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { expect, test } from 'vitest'
import { LAYOUTS } from '../../shared/layouts/registry.ts'

const FOLDERS = [
  'shared/checks',
  'shared/reading',
  'shared/schemas',
  'shared/trial',
  'server/db',
  'server/features/demonstrations',
  'server/features/layouts',
  'server/features/records',
  'server/features/sheets',
  'server/features/uploads',
  'server/print',
  'server/scripts',
  'web',
  'worker',
]

const sourcesIn = (folder: string): string[] =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.tsx?$/.test(name) && !/\.test\.tsx?$/.test(name))
    .map((name) => join(folder, name))

/** A layout by its key or code in quotes, or by its file. */
const names = new RegExp(
  LAYOUTS.flatMap(({ key, version, code }) => [`['"\`]${key}['"\`]`, `['"\`]${code}['"\`]`, `layouts/${key}-${version}`]).join(
    '|',
  ),
)

test('the search finds a layout that is named', () => {
  for (const said of ["findLayout('tillage')", "import { haulage1 } from '../layouts/haulage-1.ts'", 'code === "TI"'])
    expect(said).toMatch(names)
  expect("title: 'before tillage begins'").not.toMatch(names)
})

test.each(FOLDERS)('%s knows no layout by name', (folder) => {
  const sources = sourcesIn(folder)
  expect(sources.length).toBeGreaterThan(0)
  expect(sources.filter((path) => names.test(readFileSync(path, 'utf8')))).toEqual([])
})
