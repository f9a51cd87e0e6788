/** Opens a file of many pages, and makes a page and a job for each; a spreadsheet's runs are kept with their pages. */

import type PgBoss from 'pg-boss'
import type { DataSource } from '../../server/db/database.ts'
import { sendJobs } from '../../server/db/queue.ts'
import { insertPages, lockForSplitting } from '../../server/db/repositories/page.ts'
import { findKeptUpload, type KeptUpload, refuseUpload } from '../../server/db/repositories/upload.ts'
import type { FileStore } from '../../server/storage/store.ts'
import { PARSED_KINDS, type ParsedKind, type ParserAnswer } from '../child/answer.ts'
import { defineJob, type JobEnd, type JobHandler } from './job-handler.ts'

export interface UploadSplitDeps {
  source: DataSource
  boss: PgBoss
  files: FileStore
  parse(kind: ParsedKind, bytes: Uint8Array, options: { signal: AbortSignal }): Promise<ParserAnswer>
}

const GIVEN_UP =
  'This file could not be opened in three attempts, so it is likely damaged. Nothing was kept. Scan it again, or send the original file.'

export function uploadSplitJob(deps: UploadSplitDeps): JobHandler {
  return defineJob({
    name: 'upload-split',
    handle: async ({ uploadId }, { signal }): Promise<JobEnd> => {
      const upload = await findKeptUpload(deps.source.manager, uploadId)
      if (!upload) return 'done'
      const kind = PARSED_KINDS.find((parsed) => parsed === upload.kind)
      const answer: ParserAnswer = kind
        ? await deps.parse(kind, await deps.files.get(upload.storageKey), { signal })
        : { kind: 'pages', pages: 1 }
      if (answer.kind === 'refused') await refuse(deps, upload, answer.reason)
      else await makePages(deps, uploadId, answer)
      return 'done'
    },
    giveUp: async ({ uploadId }) => {
      const upload = await findKeptUpload(deps.source.manager, uploadId)
      if (upload) await refuse(deps, upload, GIVEN_UP)
    },
  })
}

/** The row first: a row must not promise bytes that are gone. */
async function refuse(deps: UploadSplitDeps, upload: KeptUpload, reason: string): Promise<void> {
  if (await refuseUpload(deps.source.manager, upload.id, reason)) await deps.files.remove(upload.storageKey)
}

/** Under the row's lock, and only while there are no pages: a second attempt finds them made. */
async function makePages(
  deps: UploadSplitDeps,
  uploadId: string,
  answer: Exclude<ParserAnswer, { kind: 'refused' }>,
): Promise<void> {
  const blocks = answer.kind === 'blocks' ? answer.blocks : Array.from({ length: answer.pages }, () => null)
  await deps.source.transaction(async (db) => {
    if (!(await lockForSplitting(db, uploadId))) return
    const pageIds = await insertPages(db, uploadId, blocks)
    await sendJobs(
      deps.boss,
      db,
      'page-read',
      pageIds.map((pageId) => ({ pageId })),
    )
  })
}
