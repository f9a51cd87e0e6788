/** What the commands print: plain lines, so that they read the same in a terminal and in a log. */
export function say(line: string): void {
  process.stdout.write(`${line}\n`)
}

/**
 * Prints what is being done, does it, and prints how long it took when that was long enough to notice.
 * @param options.speaks the work prints its own progress
 */
export async function step<T>(what: string, work: () => T | Promise<T>, options: { speaks?: boolean } = {}): Promise<T> {
  const begin = Date.now()
  say(`${what} …`)
  // A long silence reads as a hang.
  const ticker = options.speaks ? undefined : setInterval(() => say(`  ${what}: ${seconds(begin)} so far`), 10_000)
  try {
    const result = await work()
    if (Date.now() - begin > 500) say(`  ${what}: done in ${seconds(begin)}`)
    return result
  } finally {
    clearInterval(ticker)
  }
}

/** The time since `begin` (ms since 1970), in seconds with one decimal. */
export function seconds(begin: number): string {
  return `${((Date.now() - begin) / 1000).toFixed(1)} s`
}
