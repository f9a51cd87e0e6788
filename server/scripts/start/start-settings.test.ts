import { resolve } from 'node:path'
import { describe, expect, it } from 'vitest'
import { BadSettings } from '../../config.ts'
import { readStartSettings } from './start-settings.ts'

describe('the settings of npm start', () => {
  it('need nothing', () => {
    expect(readStartSettings({}, [])).toEqual({ DATA_DIR: resolve('.data'), POSTGRES_PORT: 0, SMTP_PORT: 0, empty: false })
  })

  it('know --empty and no other argument', () => {
    expect(readStartSettings({}, ['--empty']).empty).toBe(true)
    expect(() => readStartSettings({}, ['--full'])).toThrow('"--full" is no argument of "npm start"')
  })

  it('name what is bad for the start and for the server in one go, each once', () => {
    const read = () => readStartSettings({ PORT: 'x', POSTGRES_PORT: '-1', LOG_LEVEL: 'loud' }, [])
    const problems = caught(read).problems.map((problem) => problem.split(' ')[0])
    expect(problems.sort()).toEqual(['LOG_LEVEL', 'PORT', 'POSTGRES_PORT'])
  })
})

function caught(run: () => unknown): BadSettings {
  try {
    run()
  } catch (cause) {
    if (cause instanceof BadSettings) return cause
  }
  throw new Error('nothing was refused')
}
