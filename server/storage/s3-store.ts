import { Readable } from 'node:stream'
import type { S3Client } from '@aws-sdk/client-s3'
import { TransientError } from '../../shared/errors.ts'
import type { StoreSettings } from '../config.ts'
import { checkKey } from './key.ts'
import type { FileStore } from './store.ts'

type S3Settings = Extract<StoreSettings, { kind: 's3' }>
type Sdk = typeof import('@aws-sdk/client-s3')

/** Keeps files in one bucket of an S3 store. The SDK (a quarter of a second to load) comes with the first use. */
export function createS3Store(settings: S3Settings): FileStore {
  let connected: Promise<{ sdk: Sdk; client: S3Client }> | undefined
  const connect = () => {
    connected ??= import('@aws-sdk/client-s3').then((sdk) => ({ sdk, client: createClient(sdk, settings) }))
    return connected
  }
  const at = (key: string) => ({ Bucket: settings.bucket, Key: checkKey(key) })
  const fetchBody = async (key: string) => {
    const target = at(key)
    const { sdk, client } = await connect()
    const answer = await ask(() => client.send(new sdk.GetObjectCommand(target)))
    if (!(answer.Body instanceof Readable)) throw new Error(`The store answered "${key}" without a body.`)
    return answer.Body
  }
  return {
    async put(key, bytes) {
      const target = at(key)
      const { sdk, client } = await connect()
      await ask(() => client.send(new sdk.PutObjectCommand({ ...target, Body: bytes, ContentLength: bytes.byteLength })))
    },
    async get(key) {
      const body = await fetchBody(key).catch((cause: unknown) => explainMissing(key, cause))
      return ask(() => collect(body))
    },
    async stream(key) {
      return fetchBody(key).catch((cause: unknown) => explainMissing(key, cause))
    },
    async exists(key) {
      const target = at(key)
      const { sdk, client } = await connect()
      try {
        await ask(() => client.send(new sdk.HeadObjectCommand(target)))
        return true
      } catch (cause) {
        if (statusOf(cause) === 404) return false
        throw cause
      }
    },
    async *list() {
      const { sdk, client } = await connect()
      let next: string | undefined
      do {
        const page = await ask(() =>
          client.send(new sdk.ListObjectsV2Command({ Bucket: settings.bucket, ...(next ? { ContinuationToken: next } : {}) })),
        )
        for (const { Key, LastModified } of page.Contents ?? [])
          if (Key && LastModified) yield { key: Key, changedAt: LastModified }
        next = page.NextContinuationToken
      } while (next)
    },
    async remove(key) {
      const target = at(key)
      const { sdk, client } = await connect()
      await ask(() => client.send(new sdk.DeleteObjectCommand(target)))
    },
  }
}

function createClient(sdk: Sdk, settings: S3Settings): S3Client {
  return new sdk.S3Client({
    region: settings.region,
    endpoint: settings.endpoint,
    credentials: { accessKeyId: settings.accessKeyId, secretAccessKey: settings.secretAccessKey },
    // Stores other than the original take bucket names in the path, and some keep the SDK's checksum trailers as content.
    forcePathStyle: settings.endpoint !== undefined,
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    maxAttempts: 3,
    requestHandler: { connectionTimeout: 5_000, requestTimeout: 60_000 },
  })
}

async function collect(body: Readable): Promise<Buffer> {
  const pieces: Buffer[] = []
  for await (const piece of body) pieces.push(piece as Buffer)
  return Buffer.concat(pieces)
}

/** A store that is away or overloaded is a passing trouble; a refusal (wrong key, no such bucket) is not. */
async function ask<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work()
  } catch (cause) {
    const status = statusOf(cause)
    if (status !== undefined && status < 500 && status !== 429) throw cause
    throw new TransientError('The file store does not answer. Nothing was changed; try again in a minute.', {
      cause,
      retryAfter_s: 30,
    })
  }
}

function statusOf(cause: unknown): number | undefined {
  return (cause as { $metadata?: { httpStatusCode?: number } }).$metadata?.httpStatusCode
}

function explainMissing(key: string, cause: unknown): never {
  throw statusOf(cause) === 404 ? new Error(`The store has no file "${key}".`, { cause }) : cause
}
