import express from 'express'
import { describe, expect, it } from 'vitest'
import { createListener } from './listen.ts'

describe('a listener', () => {
  it('starts once and stops once, however often it is asked', async () => {
    const listener = createListener(express(), { host: '127.0.0.1', port: 0 })
    const [first, second] = await Promise.all([listener.start(), listener.start()])
    expect(first).toBe(second)
    await Promise.all([listener.stop(), listener.stop()])
    await expect(fetch(`http://127.0.0.1:${first}/`)).rejects.toThrow()
  })

  it('ends the request in hand before it stops', async () => {
    let arrived = () => undefined as undefined
    let goOn = () => undefined as undefined
    const inHand = new Promise<void>((resolve) => {
      arrived = () => void resolve()
    })
    const gate = new Promise<void>((resolve) => {
      goOn = () => void resolve()
    })
    const app = express().get('/', async (_req, res) => {
      arrived()
      await gate
      res.send('to the end')
    })
    const listener = createListener(app, { host: '127.0.0.1', port: 0 })
    const port = await listener.start()
    const answer = fetch(`http://127.0.0.1:${port}/`)
    await inHand
    const stopped = listener.stop()
    goOn()
    expect(await (await answer).text()).toBe('to the end')
    await stopped
  })

  it('says why it cannot listen', async () => {
    const first = createListener(express(), { host: '127.0.0.1', port: 0 })
    const port = await first.start()
    await expect(createListener(express(), { host: '127.0.0.1', port }).start()).rejects.toThrow('EADDRINUSE')
    await first.stop()
  })
})
