/** How long to wait for a state, and how often to look. */
export interface WaitOptions {
  /** What is waited for, in words: it is the failure's message. */
  what?: string
  deadline_ms?: number
  every_ms?: number
}

/**
 * Looks until `look` gives something (neither null, undefined nor false) and returns it.
 * A look that throws counts as "not yet"; its error is the cause when the deadline passes.
 */
export async function waitFor<T>(look: () => T | Promise<T>, options: WaitOptions = {}): Promise<NonNullable<Exclude<T, false>>> {
  const { what = 'the state', deadline_ms = 15_000, every_ms = 50 } = options
  const end = Date.now() + deadline_ms
  for (;;) {
    const [seen, cause] = await tryOnce(look)
    if (seen !== null && seen !== undefined && seen !== false) return seen as NonNullable<Exclude<T, false>>
    if (Date.now() > end) throw new Error(`Waited ${deadline_ms} ms for ${what}; it did not come.`, { cause })
    await new Promise((resolve) => setTimeout(resolve, every_ms))
  }
}

async function tryOnce<T>(look: () => T | Promise<T>): Promise<[T | undefined, unknown]> {
  try {
    return [await look(), undefined]
  } catch (cause) {
    return [undefined, cause]
  }
}
