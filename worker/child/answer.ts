/** What the parser process is asked, and answers. */
import { z } from 'zod'
import { blockSchema } from '../readers/spreadsheet/block.ts'

export const PARSED_KINDS = ['pdf', 'tiff', 'xlsx', 'csv'] as const
export type ParsedKind = (typeof PARSED_KINDS)[number]

export const answerSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('pages'), pages: z.number().int() }),
  z.object({ kind: z.literal('blocks'), blocks: z.array(blockSchema) }),
  /** In words for whoever sent the file. */
  z.object({ kind: z.literal('refused'), reason: z.string() }),
])
export type ParserAnswer = z.infer<typeof answerSchema>
