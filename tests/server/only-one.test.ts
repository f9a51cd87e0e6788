import { type ChildProcess, spawn } from 'node:child_process'
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { takeFolder } from '../../server/scripts/start/only-one.ts'
import { waitFor } from '../support/wait-for.ts'

describe('the data folder', () => {
  let folder: string
  let other: ChildProcess

  beforeAll(async () => {
    folder = mkdtempSync(join(tmpdir(), 'sheafbook-folder-'))
    // Looks like another start by its command line.
    other = spawn(process.execPath, ['-e', 'setInterval(() => undefined, 1000)', 'server/scripts/start.ts'])
    await waitFor(() => other.pid !== undefined, { what: 'the other start' })
  })
  afterAll(() => {
    other.kill()
    rmSync(folder, { recursive: true, force: true })
  })

  it('belongs to one start at a time', () => {
    writeFileSync(join(folder, 'start.pid'), String(other.pid))
    expect(() => takeFolder(folder)).toThrow(`Sheafbook already runs from this folder (process ${other.pid}).`)
  })

  it('is free again when the start that took it was killed and its number given to another program', () => {
    writeFileSync(join(folder, 'start.pid'), String(process.ppid))
    const release = takeFolder(folder)
    release()
    expect(existsSync(join(folder, 'start.pid'))).toBe(false)
  })
})
