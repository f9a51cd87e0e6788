/** A parser that does to its process what its input says. */
import { text } from 'node:stream/consumers'

const what = await text(process.stdin)
if (what === 'fills the memory') {
  const kept: number[][] = []
  for (;;) kept.push(Array.from({ length: 100_000 }, Math.random))
}
if (what === 'fills buffers') {
  const kept: Buffer[] = []
  setInterval(() => kept.push(Buffer.alloc(20_000_000, 1)), 20)
}
if (what === 'never ends') setInterval(() => undefined, 1_000)
if (what === 'dies') process.kill(process.pid, 'SIGKILL')
