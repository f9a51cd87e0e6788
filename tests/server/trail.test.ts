import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { writeTrail } from '../../server/features/trail/trail.service.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

describe('the trail', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer()
  })
  afterAll(() => server.close())

  const lines = async (agent: { get(path: string): Promise<{ body: unknown }> }, path: string) =>
    (await agent.get(path)).body as { entries: { id: number; text: string }[]; next: number | null }

  it('is read page by page, newest first, each line once', async () => {
    const admin = await server.signIn('admin')
    await server.deps.source.transaction(async (db) => {
      for (let i = 0; i < 230; i++)
        await writeTrail(db, { actor: admin.user, action: 'note', subject: 'test', subjectId: null, text: `line ${i}` })
    })
    const seen: number[] = []
    let path: string | null = '/trail'
    while (path) {
      const { entries, next } = await lines(admin, path)
      seen.push(...entries.map(({ id }) => id))
      path = next === null ? null : `/trail?after=${next}`
    }
    expect(seen.length).toBeGreaterThan(230)
    expect(new Set(seen).size).toBe(seen.length)
    expect([...seen].sort((a, b) => b - a)).toEqual(seen)
  })

  it('loses the line of a change that was taken back', async () => {
    const admin = await server.signIn('admin')
    const undone = server.deps.source.transaction(async (db) => {
      await writeTrail(db, { actor: admin.user, action: 'note', subject: 'test', subjectId: null, text: 'never happened' })
      throw new Error('taken back')
    })
    await expect(undone).rejects.toThrow('taken back')
    expect((await lines(admin, '/trail')).entries.map(({ text }) => text)).not.toContain('never happened')
  })

  it('can be added to by the application, and neither changed, deleted from nor emptied', async () => {
    for (const sql of [`UPDATE trail SET text = 'other'`, 'DELETE FROM trail', 'TRUNCATE trail'])
      await expect(server.deps.source.query(sql), sql).rejects.toThrow(/permission denied/)
  })
})
