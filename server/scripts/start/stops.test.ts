import { afterEach, describe, expect, it, vi } from 'vitest'
import { Stops } from './stops.ts'

/** process.exit would end the test's own process; it is the one thing exchanged here. */
function catchExit(): number[] {
  const codes: number[] = []
  vi.spyOn(process, 'exit').mockImplementation((code) => {
    codes.push(Number(code))
    return undefined as never
  })
  return codes
}

describe('stopping', () => {
  afterEach(() => vi.restoreAllMocks())

  it('goes backwards through what was started, and then ends the process', async () => {
    const codes = catchExit()
    const order: string[] = []
    const stops = new Stops()
    for (const name of ['database', 'mail', 'server']) stops.add(() => void order.push(name))
    await stops.runAndExit(0)
    expect([order, codes]).toEqual([['server', 'mail', 'database'], [0]])
  })

  it('goes on when one of them fails, and happens once however often it is asked', async () => {
    catchExit()
    vi.spyOn(process.stdout, 'write').mockReturnValue(true)
    const order: string[] = []
    const stops = new Stops()
    stops.add(() => void order.push('database'))
    stops.add(() => Promise.reject(new Error('the server was gone already')))
    await Promise.all([stops.runAndExit(0), stops.runAndExit(0)])
    expect(order).toEqual(['database'])
  })

  it('takes along what is started while it runs', async () => {
    catchExit()
    const order: string[] = []
    const stops = new Stops()
    stops.add(async () => {
      stops.add(() => void order.push('late'))
      order.push('early')
    })
    await stops.runAndExit(0)
    expect(order).toEqual(['early', 'late'])
  })
})
