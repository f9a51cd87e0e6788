import { describe, expect, it } from 'vitest'
import { MAINTENANCE_S, QUEUE_OPTIONS } from './queue.ts'

describe('the queue', () => {
  it('gives the page of a killed worker to another within 45 seconds', () => {
    // The job expires; the tick that should see it may come a moment early and be skipped, so the next one does; the retry
    // waits its delay; a worker that is free looks every half second. Bar: G-R4, 45 s from the kill to the restart.
    const look_s = 0.5
    const { expireInSeconds, retryDelay } = QUEUE_OPTIONS
    expect(expireInSeconds + 2 * MAINTENANCE_S + retryDelay + look_s).toBeLessThanOrEqual(45)
  })

  it('lets one file kill three workers at most', () => {
    expect(1 + QUEUE_OPTIONS.retryLimit).toBe(3)
  })
})
