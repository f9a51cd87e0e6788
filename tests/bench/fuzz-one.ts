/** Hands one foreign picture to the reader and says what came of it. */
import { UserError } from '../../shared/errors.ts'
import { makeForeign } from '../simulator/foreign.ts'
import { sameValue } from './compare.ts'
import type { BenchReader } from './reading-json.ts'

export interface Outcome {
  n: number
  kind: string
  /** clear: readings came out clear that are not what was written. hung: no answer within the limit. */
  what: 'refused' | 'take again' | 'all in doubt' | 'read as written' | 'clear' | 'hung' | 'crashed'
  detail: string
}

const LIMIT_MS = 30_000

export const isFault = (outcome: Outcome): boolean => ['clear', 'hung', 'crashed'].includes(outcome.what)

export async function tryForeign(reader: BenchReader, n: number): Promise<Outcome> {
  const { kind, bytes, shows } = await makeForeign(n)
  const say = (what: Outcome['what'], detail: string): Outcome => ({ n, kind, what, detail })
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<'late'>((resolve) => {
    timer = setTimeout(() => resolve('late'), LIMIT_MS)
  })
  try {
    const pages = await Promise.race([reader.read(bytes, `foreign-${n}.jpg`), late])
    if (pages === 'late') return say('hung', `no answer in ${LIMIT_MS / 1000} s`)
    const clear = pages.flatMap((page) => Object.entries(page.readings).filter(([, r]) => r.state === 'clear'))
    const wrong = clear.filter(([key, { value }]) => !shows || !sameValue(value, shows[key] ?? null))
    if (wrong.length > 0) return say('clear', `${wrong.length} clear, ${wrong[0]![0]} as ${String(wrong[0]![1].value)}`)
    if (clear.length > 0) return say('read as written', `${clear.length} clear`)
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
