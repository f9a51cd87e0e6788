import { mkdtemp, readdir, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { text } from 'node:stream/consumers'
import S3rver from 's3rver'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createFolderStore } from '../../server/storage/folder-store.ts'
import { createFileStore, type FileStore } from '../../server/storage/store.ts'
import { TransientError } from '../../shared/errors.ts'

let folder: string
let s3: { server: S3rver; port: number }

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'sheafbook-store-'))
  s3 = await startS3(join(folder, 's3'))
})

afterAll(async () => {
  await s3.server.close()
  await rm(folder, { recursive: true, force: true })
})

const stores: [string, () => FileStore][] = [
  ['a local folder', () => createFileStore({ kind: 'folder', dir: join(folder, 'local') })],
  ['S3', () => createFileStore(s3Settings(s3.port))],
]

describe.each(stores)('files in %s', (_name, create) => {
  it('come back byte for byte', async () => {
    const store = create()
    const bytes = Uint8Array.from({ length: 300_000 }, (_, index) => (index * 31) % 256)
    await store.put('sheets/ab12/original.jpg', bytes)
    expect(Buffer.compare(await store.get('sheets/ab12/original.jpg'), bytes)).toBe(0)
  })

  it('come back as a stream', async () => {
    const store = create()
    await store.put('notes/one.txt', Buffer.from('ten depths'))
    expect(await text(await store.stream('notes/one.txt'))).toBe('ten depths')
  })

  it('are replaced as a whole', async () => {
    const store = create()
    await store.put('notes/two.txt', Buffer.from('a longer first text'))
    await store.put('notes/two.txt', Buffer.from('short'))
    expect((await store.get('notes/two.txt')).toString()).toBe('short')
  })

  it('are listed with the time of their last change', async () => {
    const store = create()
    await store.put('listed/one.txt', Buffer.from('x'))
    const found = []
    for await (const file of store.list()) if (file.key.startsWith('listed/')) found.push(file)
    expect(found.map((file) => file.key)).toEqual(['listed/one.txt'])
    expect(Math.abs(found[0]!.changedAt.getTime() - Date.now())).toBeLessThan(60_000)
  })

  it('are gone after removal, and removing twice is no error', async () => {
    const store = create()
    await store.put('notes/three.txt', Buffer.from('x'))
    expect(await store.exists('notes/three.txt')).toBe(true)
    await store.remove('notes/three.txt')
    await store.remove('notes/three.txt')
    expect(await store.exists('notes/three.txt')).toBe(false)
  })

  it('that were never kept are named in the error', async () => {
    const store = create()
    await expect(store.get('notes/none.txt')).rejects.toThrow('The store has no file "notes/none.txt".')
    await expect(store.stream('notes/none.txt')).rejects.toThrow('The store has no file "notes/none.txt".')
  })

  it.each(['../outside', 'a/../../b', '/etc/passwd', 'A', ''])('are refused under the key "%s"', async (key) => {
    await expect(create().put(key, Buffer.from('x'))).rejects.toThrow('is no storage key')
  })
})

describe('a nearly full disk', () => {
  it.each([
    ['under 2 GB', { free_bytes: 1.9e9, total_bytes: 4e9 }],
    ['under a tenth', { free_bytes: 9e9, total_bytes: 100e9 }],
  ])('takes nothing in with %s free', async (_name, room) => {
    const place = await mkdtemp(join(folder, 'full-'))
    const store = createFolderStore(place, async () => room)
    const refusal = await store.put('sheets/one.jpg', Buffer.from('x')).catch((cause: unknown) => cause)
    expect(refusal).toBeInstanceOf(TransientError)
    expect(refusal).toMatchObject({ full: true, message: expect.stringContaining('Nothing was taken in') })
    expect(await readdir(join(place, 'sheets'))).toEqual([])
  })
})

describe('an S3 store that is away', () => {
  it('is a passing trouble', async () => {
    const away = await startS3(join(folder, 's3-away'))
    await away.server.close()
    const store = createFileStore(s3Settings(away.port))
    await expect(store.put('sheets/one.jpg', Buffer.from('x'))).rejects.toThrow(TransientError)
  })
})

async function startS3(directory: string): Promise<{ server: S3rver; port: number }> {
  const server = new S3rver({
    port: 0,
    address: '127.0.0.1',
    silent: true,
    directory,
    configureBuckets: [{ name: 'sheets', configs: [] }],
  })
  const { port } = await server.run()
  return { server, port }
}

/** The key pair is the fake's own, from its documentation. */
function s3Settings(port: number) {
  const endpoint = `http://127.0.0.1:${port}`
  return {
    kind: 's3',
    bucket: 'sheets',
    endpoint,
    region: 'us-east-1',
    accessKeyId: 'S3RVER',
    secretAccessKey: 'S3RVER',
  } as const
}
