import { describe, expect, it } from 'vitest'
import { BadSettings, readSettings, readWorkerSettings } from './config.ts'

const least = { DATABASE_URL: 'postgresql://app:pw@127.0.0.1:5432/book', SESSION_SECRET: 'x'.repeat(32) }

describe('reading the settings', () => {
  it('needs no more than a database and a secret', () => {
    const settings = readSettings(least)
    expect(settings).toMatchObject({
      port: 4180,
      publicUrl: 'http://localhost:4180',
      store: { kind: 'folder', dir: '.data/files' },
    })
  })

  it('names every bad variable at once', () => {
    const read = () =>
      readSettings({ DATABASE_URL: 'mysql://x/y', PORT: 'eighty', SESSION_SECRET: 'short', LOG_LEVEL: 'loud', S3_BUCKET: 'b' })
    expect(read).toThrow(BadSettings)
    for (const name of ['DATABASE_URL', 'PORT', 'SESSION_SECRET', 'LOG_LEVEL', 'S3_ACCESS_KEY_ID']) expect(read).toThrow(name)
  })

  it('says what a number must be', () => {
    expect(() => readSettings({ ...least, PORT: '70000' })).toThrow('PORT must be a whole number from 0 to 65535')
  })

  it('says that a variable is missing rather than wrong', () => {
    expect(() => readSettings({ SESSION_SECRET: least.SESSION_SECRET })).toThrow('DATABASE_URL is missing')
  })

  it('keeps the value of a bad secret out of its message', () => {
    expect(() => readSettings({ ...least, SESSION_SECRET: 'hunter2' })).not.toThrow('hunter2')
  })

  it('takes an empty variable as absent', () => {
    expect(readSettings({ ...least, PORT: '', S3_BUCKET: ' ' })).toMatchObject({ port: 4180, store: { kind: 'folder' } })
  })

  it('keeps files in S3 when a bucket is named, and then asks for its keys', () => {
    const bucket = { ...least, S3_BUCKET: 'sheets' }
    expect(() => readSettings(bucket)).toThrow('S3_SECRET_ACCESS_KEY is needed with S3_BUCKET')
    const store = readSettings({
      ...bucket,
      S3_ACCESS_KEY_ID: 'id',
      S3_SECRET_ACCESS_KEY: 'key',
      S3_ENDPOINT: 'http://127.0.0.1:9000/',
    }).store
    expect(store).toEqual({
      kind: 's3',
      bucket: 'sheets',
      endpoint: 'http://127.0.0.1:9000',
      region: 'us-east-1',
      accessKeyId: 'id',
      secretAccessKey: 'key',
    })
  })

  it('drops the slash at the end of the public address', () => {
    expect(readSettings({ ...least, PUBLIC_URL: 'https://sheaf.example.org/' }).publicUrl).toBe('https://sheaf.example.org')
  })

  it('asks a worker for no session secret', () => {
    expect(readWorkerSettings({ DATABASE_URL: least.DATABASE_URL }).databaseUrl).toBe(least.DATABASE_URL)
  })
})
