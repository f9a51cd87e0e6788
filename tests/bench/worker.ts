/**
 * npm run bench:worker -- [FOLDER] [--pages 2000] [--workers 2]
 * Reads pages through worker processes on one queue, with a real PostgreSQL: pages a minute, and the memory of every process at
 * pages 200, 1,000 and at the end. Photos of the folder take turns (the standard set without one). Beside it the floor: the bare
 * decode of the same photos.
 */
import { readFile } from 'node:fs/promises'
import { parseArgs } from 'node:util'
import { pause } from '../../worker/poll.ts'
import { decodeMs } from './peers.ts'
import { cpuSeconds, familyOf, residentMb } from './processes.ts'
import { photosIn } from './read-folder.ts'
import { standardSet } from './standard-set.ts'
import { quantile } from './statistics.ts'
import { openWorkerLine } from './worker-line.ts'

/** Photos held and decoded: enough to be unlike each other, few enough to be put into the store quickly. */
const MOST_PHOTOS = 120
const LOOK_MS = 250
const CORES = 2
const BARS = { pagesAMinute: 75, resident_mb: 600, growth: 0.05 }

const { values, positionals } = parseArgs({
  options: { pages: { type: 'string', default: '2000' }, workers: { type: 'string', default: '2' } },
  allowPositionals: true,
})
const say = (line: string) => process.stdout.write(`${line}\n`)
const pages = Number(values.pages)
const stems = await photosIn(positionals[0] ?? (await standardSet(60, false, say)))
// Evenly through the folder, so that every level has its share.
const chosen = stems.filter((_, i) => i % Math.ceil(stems.length / MOST_PHOTOS) === 0)
const pictures = await Promise.all(chosen.map((stem) => readFile(`${stem}.jpg`)))
const decode: number[] = []
for (const picture of pictures.slice(0, 20)) decode.push(await decodeMs(picture))
const floor_ms = quantile(
  decode.sort((a, b) => a - b),
  0.5,
)

const line = await openWorkerLine()
try {
  await line.fill(pictures, pages)
  const workers = Array.from({ length: Number(values.workers) }, () => line.startWorker())
  const marks = [...[200, 1000, 2000].filter((mark) => mark < pages), pages]
  const seen: Array<{ at: number; resident_mb: number[] }> = []
  const family = async () => (await Promise.all(workers.map((worker) => familyOf(worker.pid!)))).flat()
  const cpu = async () => (await Promise.all((await family()).map(cpuSeconds))).reduce((a, b) => a + b, 0)

  // The clock starts with the first page done: programs and nets are loaded by then.
  await untilDone(1)
  const [started, cpuBefore, before] = [performance.now(), await cpu(), await done()]
  for (const at of marks) {
    await untilDone(at)
    seen.push({ at, resident_mb: await Promise.all((await family()).map(residentMb)) })
  }
  const minutes = (performance.now() - started) / 60_000
  const cpu_s = ((await cpu()) - cpuBefore) / (pages - before)
  report(minutes, (pages - before) / minutes, cpu_s, seen)
} finally {
  await line.close()
}

async function done(): Promise<number> {
  const rows = await line.source.query("SELECT count(*)::int AS n FROM pages WHERE state IN ('read', 'take again', 'unreadable')")
  return rows[0].n
}

async function untilDone(count: number): Promise<void> {
  while ((await done()) < count) await pause(LOOK_MS, new AbortController().signal)
}

function report(minutes: number, aMinute: number, cpu_s: number, seen: ReadonlyArray<{ at: number; resident_mb: number[] }>) {
  const { pagesAMinute, resident_mb, growth } = BARS
  say(
    `${pages} pages, ${values.workers} workers, ${minutes.toFixed(1)} min: ${aMinute.toFixed(1)} pages a minute (bar ${pagesAMinute})`,
  )
  say(
    `processor time of the workers ${cpu_s.toFixed(2)} s a page, so at most ${((60 * CORES) / cpu_s).toFixed(0)} a minute on ${CORES} free cores`,
  )
  say(
    `floor: bare decode ${floor_ms.toFixed(0)} ms of processor time, at most ${((60_000 * CORES) / floor_ms).toFixed(0)} a minute`,
  )
  for (const { at, resident_mb: each } of seen) {
    say(`at page ${at}: ${each.map((mb) => mb.toFixed(0)).join(', ')} MB resident (each worker and what it started)`)
  }
  const largest = seen.map(({ resident_mb: each }) => Math.max(...each))
  const grown = largest.at(-1)! / largest[0]! - 1
  const flat = seen.length > 1 ? `, ${(100 * grown).toFixed(1)} % since page ${seen[0]!.at} (bar ${100 * growth} %)` : ''
  say(`largest process ${largest.at(-1)!.toFixed(0)} MB (bar ${resident_mb})${flat}`)
}
