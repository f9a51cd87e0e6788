import { execFileSync } from 'node:child_process'
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join, resolve } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'

/** [file, what it imports]. The linter's own configuration is run on them, in a folder of their own. */
const BREACHES: [string, string][] = [
  ['shared/trial/a.ts', 'node:fs'],
  ['shared/trial/b.ts', 'react'],
  ['shared/trial/c.ts', '@tanstack/react-query'],
  ['shared/trial/d.ts', '../../server/config.ts'],
  ['shared/compare/a.ts', '@stdlib/stats-ttest'],
  ['web/lib/a.ts', '../../server/config.ts'],
  ['web/lib/b.ts', '../app/router.tsx'],
  ['web/ui/a.tsx', '../features/sheets/sheets.queries.ts'],
  ['web/ui/b.tsx', 'node:path'],
  ['web/features/sheets/a.tsx', '../records/records.queries.ts'],
  ['web/features/sheets/components/a.tsx', '../../records/records.queries.ts'],
  ['web/features/sheets/components/b.tsx', '../../../../worker/main.ts'],
  ['server/features/sheets/a.ts', '../../../web/main.tsx'],
  ['server/features/sheets/b.ts', 'typeorm'],
  ['server/db/a.ts', '../../worker/main.ts'],
  ['worker/jobs/a.ts', '../../server/app.ts'],
  ['worker/jobs/b.ts', '../../server/features/sheets/sheets.service.ts'],
  ['worker/jobs/c.ts', '../../web/main.tsx'],
  ['worker/jobs/d.ts', 'typeorm'],
]

const ALLOWED: [string, string][] = [
  ['shared/trial/y.ts', 'zod'],
  ['shared/trial/z.ts', '../schemas/sheet.ts'],
  ['shared/compare/z.ts', '@stdlib/stats-base-dists-t-cdf'],
  ['web/features/sheets/y.tsx', './sheets.queries.ts'],
  ['web/features/sheets/components/y.tsx', '../sheets.queries.ts'],
  ['web/features/sheets/components/z.tsx', '../../../../shared/schemas/sheet.ts'],
  ['web/app/z.tsx', '../features/sheets/sheets.queries.ts'],
  ['server/features/sheets/z.ts', '../../../shared/schemas/sheet.ts'],
  ['server/db/z.ts', 'typeorm'],
  ['worker/jobs/x.ts', '../../server/db/index.ts'],
  ['worker/jobs/y.ts', '../../server/storage/store.ts'],
  ['worker/jobs/z.ts', '../../shared/schemas/sheet.ts'],
]

describe('the zones of the house', () => {
  let refused: Set<string>
  let folder: string

  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'sheafbook-zones-'))
    const { $schema: _schema, vcs: _vcs, ...config } = JSON.parse(readFileSync('biome.json', 'utf8'))
    write('biome.json', JSON.stringify(config))
    for (const [file, target] of [...BREACHES, ...ALLOWED])
      write(file, `import * as it from '${target}'\nexport const kept = it\n`)
    write('shared/cycle/a.ts', "import { b } from './b.ts'\nexport const a = () => b\n")
    write('shared/cycle/b.ts', "import { a } from './a.ts'\nexport const b = () => a\n")
    write('server/reads-environment.ts', 'export const port = process.env.PORT\n')
    write('shared/reads-document.ts', 'export const title = () => document.title\n')
    refused = lint(folder)
  })
  afterAll(() => rmSync(folder, { recursive: true, force: true }))

  it.each(BREACHES)('keep %s from importing %s', (file) => {
    expect(refused).toContain(file)
  })

  it.each(ALLOWED)('let %s import %s', (file) => {
    expect(refused).not.toContain(file)
  })

  it('refuse two files that import each other', () => {
    expect(refused).toContain('shared/cycle/a.ts')
  })

  it('keep the environment to the entry points and the page to web/', () => {
    expect(refused).toContain('server/reads-environment.ts')
    expect(refused).toContain('shared/reads-document.ts')
  })

  function write(file: string, content: string): void {
    mkdirSync(dirname(join(folder, file)), { recursive: true })
    writeFileSync(join(folder, file), content)
  }
})

function lint(folder: string): Set<string> {
  const biome = resolve('node_modules/@biomejs/biome/bin/biome')
  const options = { cwd: folder, encoding: 'utf8', stdio: 'pipe' } as const
  const report = failing(() =>
    execFileSync(process.execPath, [biome, 'lint', '.', '--reporter=json', '--max-diagnostics=none'], options),
  )
  const { diagnostics } = JSON.parse(report) as { diagnostics: { location: { path: string } }[] }
  return new Set(diagnostics.map(({ location }) => location.path))
}

/** The linter ends with 1 when it found something, and its report is what we are after. */
function failing(run: () => string): string {
  try {
    return run()
  } catch (cause) {
    return (cause as { stdout: string }).stdout
  }
}
