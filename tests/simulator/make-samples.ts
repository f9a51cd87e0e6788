/**
 * npm run samples                     makes every photo and truth of samples/ again, and samples/season.json
 * npm run samples -- CASE...          only these cases
 * npm run samples -- --expected       reads them and writes expected.json, to be looked through against what was written
 */
import { mkdir, rm, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { parseArgs } from 'node:util'
import { writeExpected } from './expected.ts'
import { makeSample } from './make-sample.ts'
import { SAMPLE_CASES } from './sample-cases.ts'
import { SAMPLE_RUNS } from './sample-season.ts'

const ROOT = 'samples'
const readme = `# Samples

Filled sheets as they come in, each in a folder of its own: the file, NAME.truth.json (what was written) and expected.json (what
must come out of the reader: state and value of each reading, and the code where the photo is to be taken again). Photos and
scans are simulated, and the hand-writing is redrawn from an open set of digits (see NOTICE); people, places and machines are
invented. \`npm run samples\` makes them again, \`npm run samples -- --expected\` reads them again.

season.json names the runs behind the sheets; the demonstration season is built from it.

${SAMPLE_CASES.map((c) => `- **${c.case}** (${c.level}): ${c.why}`).join('\n')}
- **form-xlsx**, **form-csv**: the spreadsheet form, filled in
`

const { values, positionals } = parseArgs({ options: { expected: { type: 'boolean', default: false } }, allowPositionals: true })
const wanted = SAMPLE_CASES.filter((c) => positionals.length === 0 || positionals.includes(c.case))

if (values.expected) await writeExpected(wanted.map((c) => c.case))
else {
  for (const sample of wanted) {
    const folder = join(ROOT, sample.case)
    await mkdir(folder, { recursive: true })
    const files = await makeSample(sample)
    for (const { name, content } of files) await writeFile(join(folder, name), content)
    await rm(join(folder, 'expected.json'), { force: true })
    process.stdout.write(`${sample.case}: ${files.map((f) => f.name).join(', ')}\n`)
  }
  await writeFile(join(ROOT, 'README.md'), readme)
  await writeFile(join(ROOT, 'season.json'), `${JSON.stringify(SAMPLE_RUNS, null, 1)}\n`)
}
process.exit(0)
