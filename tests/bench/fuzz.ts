/**
 * node --import tsx tests/bench/fuzz.ts [--count 500] [--from 0]
 * Throws damaged and foreign pictures at the reader. Ends with 1 where one hung, crashed, or gave a clear reading.
 */
import { parseArgs } from 'node:util'
import { isFault, type Outcome, tryForeign } from './fuzz-one.ts'
import { openReader } from './reader.ts'

const { values } = parseArgs({ options: { count: { type: 'string', default: '500' }, from: { type: 'string', default: '0' } } })
const [from, count] = [Number(values.from), Number(values.count)]
const reader = await openReader()
const outcomes: Outcome[] = []
for (let n = from; n < from + count; n += 1) {
  const outcome = await tryForeign(reader, n)
  outcomes.push(outcome)
  if (isFault(outcome)) process.stdout.write(`${n} ${outcome.kind}: ${outcome.what}, ${outcome.detail}\n`)
}
await reader.close()
const counts = new Map<string, number>()
for (const { kind, what, detail } of outcomes) {
  const key = `${kind}: ${what}${what === 'take again' || what === 'refused' ? `, ${detail}` : ''}`
  counts.set(key, (counts.get(key) ?? 0) + 1)
}
for (const [key, n] of [...counts].sort()) process.stdout.write(`${String(n).padStart(4)}  ${key}\n`)
const faults = outcomes.filter(isFault).length
process.stdout.write(`${outcomes.length} pictures, ${faults} faults\n`)
process.exit(faults > 0 ? 1 : 0)
