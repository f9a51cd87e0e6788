import { afterAll, afterEach } from 'vitest'

/** A test that prints something nobody expected fails: a warning is either wanted, and said so, or a fault. */
const methods = ['debug', 'error', 'info', 'log', 'warn'] as const
let printed: string[] = []

for (const method of methods) {
  console[method] = (...parts: unknown[]) => {
    printed.push(`console.${method}: ${parts.map(asText).join(' ')}`)
  }
}

afterEach(failOnLeftovers)
afterAll(failOnLeftovers)

/** Takes out what was printed so far, for a test that expects it. */
export function takePrinted(): string[] {
  const taken = printed
  printed = []
  return taken
}

function failOnLeftovers(): void {
  const left = takePrinted()
  if (left.length > 0) throw new Error(`Unexpected console output:\n${left.join('\n')}`)
}

function asText(part: unknown): string {
  if (part instanceof Error) return part.stack ?? part.message
  return typeof part === 'string' ? part : JSON.stringify(part)
}
