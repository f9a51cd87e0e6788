/**
 * The parser process: a stranger's file comes in on standard input, one JSON answer goes out on standard output. Whatever the
 * file does to a parser, it does it here, under a limit of memory and time, and not in the worker.
 */
import { buffer } from 'node:stream/consumers'
import type { SpreadsheetReading } from '../readers/spreadsheet/block.ts'
import type { ParsedKind, ParserAnswer } from './answer.ts'
import { countPdfPages } from './pdf-pages.ts'
import { countTiffPages } from './tiff-pages.ts'

const DAMAGED: Record<ParsedKind, string> = {
  pdf: 'This PDF is damaged: it cannot be opened. Nothing was kept. Scan it again, or send the original file.',
  tiff: 'This scan is damaged: it cannot be opened. Nothing was kept. Scan it again, or send the original file.',
  xlsx: 'This workbook is damaged: it cannot be opened. Nothing was kept. Open it in a spreadsheet program, save it again as XLSX and send that.',
  csv: 'This CSV file cannot be taken apart. Nothing was kept. Save it again as CSV in UTF-8 and send that.',
}

const keptNothing = (reason: string) => (reason.includes('Nothing was kept.') ? reason : `${reason} Nothing was kept.`)

const asAnswer = (reading: SpreadsheetReading): ParserAnswer =>
  reading.kind === 'blocks' ? reading : { kind: 'refused', reason: keptNothing(reading.reason) }

async function parse(kind: ParsedKind, bytes: Buffer): Promise<ParserAnswer> {
  switch (kind) {
    case 'pdf':
      return countPdfPages(bytes)
    case 'tiff':
      return countTiffPages(bytes)
    case 'xlsx':
      return asAnswer(await (await import('../readers/spreadsheet/xlsx.ts')).readXlsx(bytes))
    default:
      return asAnswer((await import('../readers/spreadsheet/csv.ts')).readCsv(bytes))
  }
}

const kind = process.argv[2] as ParsedKind
const answer = await parse(kind, await buffer(process.stdin)).catch((cause: unknown): ParserAnswer => {
  process.stderr.write(`${cause instanceof Error ? (cause.stack ?? cause.message) : String(cause)}\n`)
  return { kind: 'refused', reason: DAMAGED[kind] }
})
process.stdout.write(JSON.stringify(answer))
