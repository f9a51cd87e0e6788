import { mkdtemp, rm, utimes } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { createFileStore } from '../../server/storage/store.ts'
import { sweepFiles } from '../../worker/sweep.ts'
import { createSetting, type Setting } from './setting.ts'

let setting: Setting
let folder: string
beforeAll(async () => {
  setting = await createSetting()
  folder = await mkdtemp(join(tmpdir(), 'sweep-'))
})
afterAll(async () => {
  await setting.close()
  await rm(folder, { recursive: true })
})

it('removes files older than a day that no row names, and nothing else', async () => {
  const files = createFileStore({ kind: 'folder', dir: folder })
  const pageId = await setting.addPage('kept.jpg')
  const [{ key }]: [{ key: string }] = await setting.source.query(
    'SELECT u.storage_key AS key FROM uploads u JOIN pages p ON p.upload_id = u.id WHERE p.id = $1',
    [pageId],
  )
  await setting.source.query('UPDATE pages SET picture_key = $2 WHERE id = $1', [pageId, 'pictures/kept/1'])
  const kept = [key, 'pictures/kept/1', `uprights/${pageId}`, 'elsewhere/old']
  const orphans = ['uploads/orphan', 'pictures/orphan/1', 'uprights/orphan']
  const twoDaysAgo = new Date(Date.now() - 48 * 3_600_000)
  for (const old of [...kept, ...orphans]) {
    await files.put(old, new Uint8Array([1]))
    await utimes(join(folder, old), twoDaysAgo, twoDaysAgo)
  }
  await files.put('uploads/of-today', new Uint8Array([1]))
  expect((await sweepFiles(setting.source.manager, files)).sort()).toEqual([...orphans].sort())
  for (const there of [...kept, 'uploads/of-today']) expect([there, await files.exists(there)]).toEqual([there, true])
  expect(await sweepFiles(setting.source.manager, files)).toEqual([])
})
