/** Hands one foreign picture to the reader and says what came of it. */
import { UserError } from '../../shared/errors.ts'
import { makeForeign } from '../simulator/foreign.ts'
import type { BenchReader } from './reading-json.ts'

export interface Outcome {
  n: number
  kind: string
  /** clear: readings came out clear, which none may. hung: no answer within the limit. */
  what: 'refused' | 'take again' | 'all in doubt' | 'clear' | 'hung' | 'crashed'
  detail: string
}

const LIMIT_MS = 30_000

export const isFault = (outcome: Outcome): boolean => ['clear', 'hung', 'crashed'].includes(outcome.what)

export async function tryForeign(reader: BenchReader, n: number): Promise<Outcome> {
  const { kind, bytes } = await makeForeign(n)
  const say = (what: Outcome['what'], detail: string): Outcome => ({ n, kind, what, detail })
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<'late'>((resolve) => {
    timer = setTimeout(() => resolve('late'), LIMIT_MS)
  })
  try {
    const pages = await Promise.race([reader.read(bytes, `foreign-${n}.jpg`), late])
    if (pages === 'late') return say('hung', `no answer in ${LIMIT_MS / 1000} s`)
    const clear = pages.flatMap((page) => Object.entries(page.readings).filter(([, r]) => r.state === 'clear'))
    if (clear.length > 0) return say('clear', `${clear.length} clear, ${clear[0]![0]} as ${String(clear[0]![1].value)}`)
    const again = pages.find((page) => page.takeAgain)?.takeAgain
    return again ? say('take again', again.code) : say('all in doubt', `${pages.length} pages`)
  } catch (error) {
    return error instanceof UserError
      ? say('refused', error.code)
      : say('crashed', error instanceof Error ? (error.stack ?? '') : String(error))
  } finally {
    clearTimeout(timer)
  }
}
