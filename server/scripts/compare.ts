/**
 * npm run compare -- FILE.csv --response COLUMN --treatment COLUMN [--block COLUMN] [--paired] [--gap NUMBER]
 * The comparison of a table, as JSON on standard output. Needs no database.
 */
import { readFile } from 'node:fs/promises'
import { parseArgs } from 'node:util'
import { analyse } from '../../shared/compare/analyse.ts'
import { UserError } from '../../shared/errors.ts'
import type { DesignKind } from '../../shared/schemas/comparison.ts'
import { observationsOf } from './compare/observations-of.ts'

const USAGE =
  'usage: npm run compare -- FILE.csv --response COLUMN --treatment COLUMN [--block COLUMN] [--paired] [--gap NUMBER]\n' +
  '--paired needs --block, which names the pair; --gap is the difference worth seeing, for the needed number of replicates'

class Misused extends Error {}

function readArguments() {
  const { values, positionals } = parseArgs({
    allowPositionals: true,
    options: {
      response: { type: 'string' },
      treatment: { type: 'string' },
      block: { type: 'string' },
      paired: { type: 'boolean', default: false },
      gap: { type: 'string' },
    },
  })
  const { response, treatment, block = null, paired, gap } = values
  const [file, ...more] = positionals
  if (!file || more.length > 0) throw new Misused('Name one file.')
  if (!response || !treatment) throw new Misused('Name the columns of the response and the treatment.')
  if (paired && block === null) throw new Misused('--paired needs --block, which names the pair.')
  if (new Set([response, treatment, block]).size < 3) throw new Misused('Response, treatment and block are different columns.')
  if (gap !== undefined && !(Number(gap) > 0)) throw new Misused(`--gap is a number above 0, not “${gap}”.`)
  const kind: DesignKind = paired ? 'paired' : block === null ? 'one factor' : 'blocks'
  return { file, kind, columns: { response, treatment, block }, gaps: gap === undefined ? undefined : [Number(gap)] }
}

const WHY = {
  paired: (block: string) => `--paired: each ${block} is one pair, and the gaps within pairs are judged.`,
  blocks: (block: string) => `--block: what differs between one ${block} and the next is taken out before treatments are judged.`,
  'one factor': () => 'No block was named: nothing ties the values together, and they are compared as on unlike fields.',
} as const

async function textOf(file: string): Promise<string> {
  try {
    return await readFile(file, 'utf8')
  } catch (cause) {
    throw new UserError('not_found', `${file} cannot be read.`, { cause })
  }
}

async function main(): Promise<void> {
  const { file, kind, columns, gaps } = readArguments()
  const { observations, leftOut } = observationsOf(await textOf(file), columns)
  const question = { kind, why: WHY[kind](columns.block ?? ''), names: columns, leftOut, ...(gaps ? { gaps } : {}) }
  process.stdout.write(`${JSON.stringify(analyse(observations, question), null, 1)}\n`)
}

main().catch((error: unknown) => {
  if (!(error instanceof Error)) throw error
  if (error instanceof UserError) process.stderr.write(`${error.message}\n`)
  // parseArgs marks what it refuses with a code.
  else if (error instanceof Misused || 'code' in error) process.stderr.write(`${error.message}\n${USAGE}\n`)
  else throw error
  process.exitCode = 2
})
