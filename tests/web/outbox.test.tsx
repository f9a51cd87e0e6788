// @vitest-environment node
import { expect, test } from 'vitest'
import { type Upload, uploadSchema } from '../../shared/schemas/upload.ts'
import { createOutbox, type OutboxPorts } from '../../web/features/uploads/outbox.ts'
import type { WaitingFile } from '../../web/features/uploads/outbox-db.ts'
import { ApiError } from '../../web/lib/api-error.ts'

const upload = (file: WaitingFile, change: Partial<Upload> = {}): Upload =>
  uploadSchema.parse({
    id: '00000000-0000-4000-8000-000000000009',
    fileName: file.name,
    kind: 'jpeg',
    bytes: file.bytes.byteLength,
    sha256: file.sha256,
    receivedAt: '2026-10-13T10:16:00.000Z',
    state: 'arrived',
    reason: null,
    seenBefore: false,
    pages: [],
    ...change,
  })

/** A store that outlives the page, and a server whose answer is handed in. */
function world(send: OutboxPorts['send']) {
  const kept = new Map<string, WaitingFile>()
  const store: OutboxPorts['store'] = {
    put: async (file) => void kept.set(file.id, file),
    get: async (id) => kept.get(id),
    remove: async (id) => void kept.delete(id),
    list: async (userId) => [...kept.values()].filter((file) => file.userId === userId),
  }
  const open = () => createOutbox({ store, send, later: () => () => undefined, alone: (work) => work() })
  return { kept, open }
}

const photo = (name: string) => new File([`ink of ${name}`], name, { type: 'image/jpeg' })

test('without a line photos are kept, survive a closed page, and go once when the line is back', async () => {
  let line = false
  const sent: string[] = []
  const { kept, open } = world(async (file) => {
    if (!line) throw new ApiError('line_down', 'The line is down.')
    sent.push(file.name)
    return upload(file)
  })
  const before = open()
  const close = await before.start('mirel')
  await before.add([photo('one.jpg'), photo('two.jpg')], null)
  await before.sendAll()
  expect(before.current().items.map((item) => item.problem)).toContain('The line is down.')
  close()

  line = true
  const after = open()
  await after.start('mirel')
  expect(after.current().items).toHaveLength(2)
  await after.sendAll()
  expect(sent).toEqual(['one.jpg', 'two.jpg'])
  expect(after.current().items).toEqual([])
  expect(kept.size).toBe(0)
})

test('a photo stays until the server names the same SHA-256', async () => {
  let digest: string | null = 'f'.repeat(64)
  const { kept, open } = world(async (file) => upload(file, digest ? { sha256: digest } : {}))
  const outbox = open()
  await outbox.start('mirel')
  await outbox.add([photo('one.jpg')], null)
  await outbox.sendAll()
  expect(kept.size).toBe(1)
  expect(outbox.current().items[0]?.problem).toContain('damaged')
  digest = null
  await outbox.sendAll()
  expect(kept.size).toBe(0)
})

test('another person on the same phone sends nothing of the first', async () => {
  const sent: string[] = []
  const { open } = world(async (file) => {
    if (file.userId === 'mirel' && sent.length === 0) throw new ApiError('line_down', 'The line is down.')
    sent.push(file.name)
    return upload(file)
  })
  const first = open()
  await first.start('mirel')
  await first.add([photo('one.jpg')], null)
  await first.sendAll()
  const second = open()
  await second.start('ilya')
  await second.sendAll()
  expect(second.current().items).toEqual([])
  expect(sent).toEqual([])
})
