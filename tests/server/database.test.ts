import type PgBoss from 'pg-boss'
import type { DataSource } from 'typeorm'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { openDatabase } from '../../server/db/database.ts'
import { createBoss, sendJob } from '../../server/db/queue.ts'
import { withClient } from '../../server/postgres/roles.ts'
import { createTestDatabase, type TestDatabase } from '../support/database.ts'

let database: TestDatabase
let source: DataSource
let boss: PgBoss

beforeAll(async () => {
  database = await createTestDatabase()
  source = await openDatabase(database.url)
  boss = createBoss(database.url)
  await boss.start()
})
afterAll(async () => {
  await boss.stop({ graceful: false, wait: true })
  await source.destroy()
  await database.close()
})

const entry =
  "INSERT INTO trail (who, action, subject, subject_id, text) VALUES ('R. Imhaut', 'kept', 'sheet', gen_random_uuid(), 'depth 4')"

test('the application adds to the trail and can neither change nor delete it', async () => {
  await source.query(entry)
  await expect(source.query("UPDATE trail SET text = 'depth 5'")).rejects.toThrow(/permission denied/)
  await expect(source.query('DELETE FROM trail')).rejects.toThrow(/permission denied/)
})

test('even the owner cannot change, delete or truncate the trail', async () => {
  await withClient(database.ownerUrl, async (owner) => {
    await expect(owner.query("UPDATE trail SET text = 'depth 5'")).rejects.toThrow(/only be added to/)
    await expect(owner.query('TRUNCATE trail')).rejects.toThrow(/only be added to/)
  })
})

test('each line of the trail is chained to the one before it on the same subject', async () => {
  const subject = '6f0c2a8e-7e0b-4f0e-9d5b-0a3f5a1c9b11'
  for (const text of ['one', 'two']) {
    await source.query("INSERT INTO trail (who, action, subject, subject_id, text) VALUES ('x', 'kept', 'sheet', $1, $2)", [
      subject,
      text,
    ])
  }
  const rows = await source.query('SELECT hash, previous_hash FROM trail WHERE subject_id = $1 ORDER BY id', [subject])
  expect(rows[1].previous_hash).toBe(rows[0].hash)
  expect(rows[1].hash).toMatch(/^[0-9a-f]{64}$/)
})

test('a job stands or falls with the transaction it was sent in', async () => {
  const count = async () => (await source.query("SELECT count(*)::int AS n FROM pgboss.job WHERE name = 'mail-send'"))[0].n
  const payload = { mailId: '6f0c2a8e-7e0b-4f0e-9d5b-0a3f5a1c9b11' }
  await expect(
    source.transaction(async (db) => {
      await sendJob(boss, db, 'mail-send', payload)
      throw new Error('the row was refused')
    }),
  ).rejects.toThrow('the row was refused')
  expect(await count()).toBe(0)
  await source.transaction((db) => sendJob(boss, db, 'mail-send', payload))
  expect(await count()).toBe(1)
})
