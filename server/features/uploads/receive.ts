/** Files as they come over the wire: into a temporary folder, hashed on the way, never more than the limits. */
import { createHash, randomUUID } from 'node:crypto'
import { createWriteStream } from 'node:fs'
import { mkdir, mkdtemp, readdir, rm, stat } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { type Readable, Transform } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import type { Request, Response } from 'express'
import multer, { MulterError, type StorageEngine } from 'multer'
import { UserError } from '../../../shared/errors.ts'
import { FILE_LIMITS } from '../../../shared/limits.ts'

/** The largest of the limits by kind: what a file is, is only known later. */
const MOST_BYTES = FILE_LIMITS.pdf_bytes
/** All files of one request, and the form around them. */
export const REQUEST_BYTES = 4 * MOST_BYTES

export interface ReceivedFile {
  fileName: string
  /** Where the bytes lie for now; null when there were more than any file may have. */
  path: string | null
  bytes: number
  sha256: string
}

/**
 * Receives the `files` of a multipart request and hands them to `work`; whatever happens, the temporary folder goes afterwards.
 * @throws UserError when the request as a whole cannot be taken
 */
export async function withReceivedFiles<T>(
  req: Request,
  res: Response,
  work: (files: ReceivedFile[], fields: Record<string, unknown>) => Promise<T>,
): Promise<T> {
  if (Number(req.headers['content-length'] ?? 0) > REQUEST_BYTES) throw requestTooLarge()
  const folder = await mkdtemp(join(await incomingFolder(), 'request-'))
  try {
    const files = await parse(req, res, folder)
    return await work(files, (req.body ?? {}) as Record<string, unknown>)
  } finally {
    await rm(folder, { recursive: true, force: true })
  }
}

/** Where requests are received. What a server left there that was killed in the middle is swept when the next one starts. */
function incomingFolder(): Promise<string> {
  sweeping ??= sweepIncoming(join(tmpdir(), 'sheafbook-incoming'))
  // A folder that could not be made is tried again by the next request.
  sweeping.catch(() => {
    sweeping = undefined
  })
  return sweeping
}
let sweeping: Promise<string> | undefined

/** No request lasts an hour, so what is older belongs to nobody. */
const STALE_MS = 3_600_000

async function sweepIncoming(parent: string): Promise<string> {
  await mkdir(parent, { recursive: true, mode: 0o700 })
  for (const name of await readdir(parent)) {
    const folder = join(parent, name)
    const entry = await stat(folder).catch(() => null)
    if (entry && Date.now() - entry.mtimeMs > STALE_MS) await rm(folder, { recursive: true, force: true })
  }
  return parent
}

function parse(req: Request, res: Response, folder: string): Promise<ReceivedFile[]> {
  const received: ReceivedFile[] = []
  const upload = multer({
    storage: storeIn(folder, received),
    // Without it names arrive as latin1, and every letter beyond ASCII in pieces.
    defParamCharset: 'utf8',
    limits: {
      files: FILE_LIMITS.files_at_once,
      fields: 5,
      fieldSize: 1_000,
      fieldNameSize: 100,
      parts: FILE_LIMITS.files_at_once + 5,
    },
  })
  return new Promise((resolve, reject) => {
    upload.array('files', FILE_LIMITS.files_at_once)(req, res, (cause?: unknown) => {
      if (cause) reject(explain(cause))
      else resolve(received)
    })
  })
}

/** multer ends the whole request at its own size limit; here a file that is too large is only counted to its end. */
function storeIn(folder: string, received: ReceivedFile[]): StorageEngine {
  let requestBytes = 0
  return {
    _handleFile(_req, file, done) {
      const hash = createHash('sha256')
      // Its place is taken before its last byte is there: the answer keeps the order of the request.
      const place = received.push({ fileName: nameOf(file.originalname), path: null, bytes: 0, sha256: '' }) - 1
      const path = join(folder, randomUUID())
      let bytes = 0
      const count = new Transform({
        transform(chunk: Buffer, _encoding, next) {
          bytes += chunk.length
          requestBytes += chunk.length
          if (requestBytes > REQUEST_BYTES) return next(requestTooLarge())
          hash.update(chunk)
          next(null, bytes > MOST_BYTES ? undefined : chunk)
        },
      })
      pipeline(file.stream as Readable, count, createWriteStream(path, { mode: 0o600 })).then(
        () => {
          Object.assign(received[place]!, { path: bytes > MOST_BYTES ? null : path, bytes, sha256: hash.digest('hex') })
          done(null, { path, size: bytes })
        },
        (cause: unknown) => done(cause),
      )
    },
    _removeFile(_req, _file, done) {
      done(null)
    },
  }
}

/** The last part of the name, without control characters (they break headers and logs). */
function nameOf(name: string): string {
  const last = name.split(/[/\\]/).at(-1) ?? ''
  const plain = last.replace(/\p{Cc}|\p{Cf}/gu, '').trim()
  return plain === '' ? 'unnamed' : plain.slice(-FILE_LIMITS.name_chars)
}

const requestTooLarge = () =>
  new UserError(
    'too_large',
    `The files together are larger than ${REQUEST_BYTES / 1e6} MB. Nothing was kept. Send fewer at once.`,
  )

function explain(cause: unknown): unknown {
  if (!(cause instanceof MulterError))
    return cause instanceof Error && /multipart|unexpected end|boundary|aborted|premature close/i.test(cause.message)
      ? brokenOff(cause)
      : cause
  if (cause.code === 'LIMIT_FILE_COUNT' || cause.code === 'LIMIT_UNEXPECTED_FILE' || cause.code === 'LIMIT_PART_COUNT') {
    const message = `At most ${FILE_LIMITS.files_at_once} files at once, in the field "files". Nothing was kept. Send them in parts.`
    return new UserError('too_large', message, { cause })
  }
  return new UserError('invalid', `The form around the files cannot be read (${cause.message}). Nothing was kept.`, { cause })
}

const brokenOff = (cause: Error) =>
  new UserError('invalid', 'The files did not arrive whole. Nothing was kept. Send them again.', { cause })
