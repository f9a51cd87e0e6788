import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { withClient } from '../../server/postgres/roles.ts'
import { createTestDatabase, type TestDatabase } from '../support/database.ts'

describe('the roles of a database', () => {
  let database: TestDatabase

  beforeAll(async () => {
    database = await createTestDatabase()
  })
  afterAll(() => database.close())

  it('lets the owner make a table', async () => {
    await withClient(database.ownerUrl, (owner) => owner.query('CREATE TABLE made_by_owner (id int)'))
    const seen = await withClient(database.adminUrl, (admin) =>
      admin.query("SELECT tableowner FROM pg_tables WHERE tablename = 'made_by_owner'"),
    )
    expect(seen.rows).toEqual([{ tableowner: 'sheafbook_owner' }])
  })

  it('refuses the application a table of its own', async () => {
    const attempt = withClient(database.url, (app) => app.query('CREATE TABLE made_by_app (id int)'))
    await expect(attempt).rejects.toThrow('permission denied for schema public')
  })

  it('keeps two clones apart', async () => {
    const other = await createTestDatabase()
    await withClient(database.ownerUrl, (owner) => owner.query('CREATE TABLE only_here (id int)'))
    const attempt = withClient(other.ownerUrl, (owner) => owner.query('SELECT * FROM only_here'))
    await expect(attempt).rejects.toThrow('does not exist')
    await other.close()
  })
})
