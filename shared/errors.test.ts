import { describe, expect, it } from 'vitest'
import { TransientError, USER_ERROR_STATUS, UserError } from './errors.ts'

describe('errors people can act on', () => {
  it('are all 4xx, and keep their cause', () => {
    for (const status of Object.values(USER_ERROR_STATUS)) expect(status >= 400 && status < 500).toBe(true)
    const cause = new Error('duplicate key')
    const error = new UserError('conflict', 'This number is taken by another kit.', {
      cause,
      issues: [{ path: 'number', message: 'taken' }],
    })
    expect(error).toMatchObject({ status: 409, cause, issues: [{ path: 'number', message: 'taken' }] })
  })

  it('are told apart from passing troubles', () => {
    expect(new TransientError('The database is away.').status).toBe(503)
    expect(new TransientError('The disk is full.', { full: true }).status).toBe(507)
  })
})
