/** Sends a file as it is made: no faster than it is taken, and never more than a few at once. */
import { Readable } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import type { Response } from 'express'
import { UserError } from '../../../shared/errors.ts'
import type { Pieces } from '../../print/table.ts'

/** Each holds a connection to the database as long as it runs. */
const AT_ONCE = 4
/** Somebody who takes nothing for so long has gone. */
const IDLE_MS = 60_000
let running = 0

export interface Download {
  type: string
  /** File name; ours, so it needs no quoting. */
  name: string
  pieces: Pieces
}

/** @throws UserError `too_many` */
export async function sendDownload(res: Response, { type, name, pieces }: Download): Promise<void> {
  if (running >= AT_ONCE) {
    throw new UserError('too_many', `${AT_ONCE} downloads are running already. Take this one when one of them is done.`, {
      retryAfter_s: 10,
    })
  }
  running += 1
  try {
    res.set({ 'Content-Type': type, 'Content-Disposition': `attachment; filename="${name}"` })
    res.setTimeout(IDLE_MS, () => res.destroy())
    await pipeline(Readable.from(pieces), res)
  } catch (cause) {
    // The one who asked went away: nobody is left to be told, and nothing is wrong here.
    if (!res.destroyed || (cause as { code?: string }).code !== 'ERR_STREAM_PREMATURE_CLOSE') throw cause
  } finally {
    running -= 1
  }
}
