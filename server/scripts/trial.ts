/** npm run trial -- FILE.json: every result of a trial and every rule that fired, as JSON. Needs no database. */
import { readFile } from 'node:fs/promises'
import { readTrialFile } from '../../shared/checks/trial-file.ts'
import { trialReport } from '../../shared/checks/trial-report.ts'
import { UserError } from '../../shared/errors.ts'

const USAGE = 'usage: npm run trial -- FILE.json   ({ "readings": { … }, "facts": { … }, "settings": { … } })'

function fail(message: string): never {
  process.stderr.write(`${message}\n`)
  process.exit(2)
}

async function contentOf(file: string): Promise<unknown> {
  try {
    return JSON.parse(await readFile(file, 'utf8'))
  } catch (cause) {
    return fail(`${file} cannot be read as JSON: ${cause instanceof Error ? cause.message : String(cause)}`)
  }
}

const [file, ...more] = process.argv.slice(2)
if (!file || more.length > 0) fail(USAGE)
try {
  process.stdout.write(`${JSON.stringify(trialReport(readTrialFile(await contentOf(file))), null, 1)}\n`)
} catch (error) {
  if (!(error instanceof UserError)) throw error
  fail(`${file}: ${error.message}`)
}
