/**
 * node --import tsx tests/bench/typed.ts [--count 20]
 * Makes sheets filled in on a computer, scanned and photographed by turns, reads them, and prints how many of the typed
 * readings came out right, in doubt and wrong. Simulated, like every photo of the bench.
 */
import { parseArgs } from 'node:util'
import { findLayout } from '../../shared/layouts/registry.ts'
import { chanceOf } from '../simulator/random.ts'
import { makeTyped, type TypedRequest } from '../simulator/typed/make-typed.ts'
import { sameValue } from './compare.ts'
import { openReader } from './reader.ts'
import { exactInterval } from './statistics.ts'

const { values } = parseArgs({
  options: { count: { type: 'string', default: '20' }, layout: { type: 'string', default: 'tillage' } },
})
const layout = findLayout(values.layout)
if (!layout) throw new RangeError(`no layout "${values.layout}"`)

const WAYS: ReadonlyArray<TypedRequest['by']> = ['scan', 'easy', 'scan', 'ordinary']
const totals = { right: 0, doubt: 0, wrong: 0, blanksFilled: 0, takeAgain: 0 }
const reader = await openReader()
for (let n = 0; n < Number(values.count); n += 1) {
  const by = WAYS[n % WAYS.length]!
  const { jpeg, truth, typing } = await makeTyped({ layout, chance: chanceOf(`typed sheet ${n}`), by })
  const [page] = await reader.read(jpeg, `typed-${n}`)
  if (!page || page.takeAgain) {
    totals.takeAgain += 1
    process.stdout.write(`${n} ${by}: take again, ${page?.takeAgain?.code}\n`)
    continue
  }
  const wrong: string[] = []
  const own = { right: 0, doubt: 0 }
  for (const [key, typed] of Object.entries(truth.readings)) {
    const cell = layout.cells.find((c) => c.key === key)
    const reading = page.readings[key]
    if (!reading || !cell || cell.kind === 'line' || cell.kind === 'signature') continue
    const isBlank = typed === null || typed === false
    const right = sameValue(reading.value, typed)
    if (reading.state === 'clear' && !right) wrong.push(`${key} typed ${typed}, read ${reading.value}`)
    if (isBlank) totals.blanksFilled += reading.state === 'clear' && !right ? 1 : 0
    else if (reading.state === 'in doubt') own.doubt += 1
    else if (right) own.right += 1
    else totals.wrong += 1
  }
  totals.right += own.right
  totals.doubt += own.doubt
  const set = `${typing.face}, ${typing.size_pt.toFixed(1)} pt, ${typing.way}`
  process.stdout.write(
    `${n} ${by}, ${set}: ${own.right} right, ${own.doubt} in doubt, ${wrong.length} wrong ${wrong.join('; ')}\n`,
  )
}
await reader.close()

const { right, doubt, wrong, blanksFilled, takeAgain } = totals
const clear = right + wrong
const { low, high } = exactInterval(wrong, clear)
const percent = (share: number) => `${(100 * share).toFixed(2)} %`
process.stdout.write(
  `typed readings (simulated): ${right + doubt + wrong}; right ${percent(right / (right + doubt + wrong))}, in doubt ${percent(doubt / (right + doubt + wrong))}, wrong ${wrong} of ${clear} clear (${percent(low)} to ${percent(high)}); blanks read as filled ${blanksFilled}; to take again ${takeAgain}\n`,
)
process.exit(0)
