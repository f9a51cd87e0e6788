/** The queue's jobs: name and payload. A payload carries ids only; the handler reloads the row. */
import { z } from 'zod'

export const JOBS = {
  /** Opens a file of many pages (PDF, TIFF, spreadsheet) and makes a page and a job for each. */
  'upload-split': z.object({ uploadId: z.uuid() }),
  'page-read': z.object({ pageId: z.uuid() }),
  'mail-send': z.object({ mailId: z.uuid() }),
  'webhook-send': z.object({ deliveryId: z.uuid() }),
} as const
export type JobName = keyof typeof JOBS
export type JobPayload<N extends JobName> = z.infer<(typeof JOBS)[N]>
