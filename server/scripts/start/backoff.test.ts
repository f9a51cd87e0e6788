import { describe, expect, it } from 'vitest'
import { fallAgain, NO_FALLS } from './backoff.ts'

describe('the wait before a fallen process is started again', () => {
  it('doubles while it keeps falling', () => {
    const first = fallAgain(NO_FALLS, 10)
    const second = fallAgain(first, 10)
    expect([first.wait_ms, second.wait_ms, fallAgain(second, 10).wait_ms]).toEqual([500, 1_000, 2_000])
  })

  it('never exceeds half a minute', () => {
    let falls = NO_FALLS
    for (let count = 0; count < 50; count += 1) falls = fallAgain(falls, 10)
    expect(falls).toEqual({ inARow: 50, wait_ms: 30_000 })
  })

  it('is short again after a minute of life', () => {
    expect(fallAgain({ inARow: 6, wait_ms: 16_000 }, 60_000)).toEqual({ inARow: 1, wait_ms: 500 })
  })
})
