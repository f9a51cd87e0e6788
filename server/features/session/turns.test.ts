import { describe, expect, it } from 'vitest'
import { TransientError } from '../../../shared/errors.ts'
import { createTurns } from './turns.ts'

/** Work that ends when it is told to. */
function pieces(count: number, turn: ReturnType<typeof createTurns>) {
  const state = { running: 0, most: 0, end: [] as (() => void)[] }
  const all = Array.from({ length: count }, (_, i) =>
    turn(async () => {
      state.running += 1
      state.most = Math.max(state.most, state.running)
      await new Promise<void>((resolve) => state.end.push(resolve))
      state.running -= 1
      return i
    }),
  )
  return { state, all }
}

describe('turns', () => {
  it('run two at once, the others after them in their order', async () => {
    const { state, all } = pieces(7, createTurns(2, 100))
    for (let ended = 0; ended < 7; ended++) {
      while (state.end.length <= ended) await Promise.resolve()
      state.end[ended]?.()
    }
    expect(await Promise.all(all)).toEqual([0, 1, 2, 3, 4, 5, 6])
    expect(state.most).toBe(2)
  })

  it('go on after a piece of work that fails', async () => {
    const turn = createTurns(1, 100)
    const failing = turn(async () => {
      throw new Error('failed')
    })
    const next = turn(async () => 'done')
    await expect(failing).rejects.toThrow('failed')
    expect(await next).toBe('done')
  })

  it('turn away what would wait behind too many', async () => {
    const { state, all } = pieces(4, createTurns(1, 2))
    await expect(all[3]).rejects.toThrow(TransientError)
    for (let ended = 0; ended < 3; ended++) {
      while (state.end.length <= ended) await Promise.resolve()
      state.end[ended]?.()
    }
    expect(await Promise.all(all.slice(0, 3))).toEqual([0, 1, 2])
  })
})
