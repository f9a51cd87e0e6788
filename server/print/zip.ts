/**
 * A ZIP archive written as it comes (PKWARE APPNOTE 6.3.10): sizes and checksum of an entry stand behind it, so nothing is held.
 * Our own: what is installed for it comes with the workbook library only, and is no dependency of ours.
 */
import { Readable } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import { crc32, createDeflateRaw } from 'node:zlib'
import type { Pieces } from './table.ts'

export interface ZipEntry {
  name: string
  content: AsyncIterable<Buffer>
}

/** Bit 3: sizes follow the content; bit 11: names are UTF-8 (4.4.4). */
const FLAGS = 0x0808
const DEFLATE = 8
const VERSION = 20
/** Deflate's quickest levels cost a third of the usual one, for files a tenth larger. */
const LEVEL = 2
/** Sizes are written with 32 bits. */
const MOST = 0xffff_ffff

interface Written {
  name: Buffer
  crc: number
  packed: number
  unpacked: number
  offset: number
}

/** Fields of a record, each with its width in bytes. */
function fields(...list: ReadonlyArray<readonly [number, 2 | 4]>): Buffer {
  const buffer = Buffer.alloc(list.reduce((sum, [, width]) => sum + width, 0))
  let at = 0
  for (const [value, width] of list) at = buffer.writeUIntLE(value, at, width)
  return buffer
}

/** Days count from 1980 (4.4.6): the day is written, the time of day is left at midnight. */
const dosDate = (at: Date) => ((at.getUTCFullYear() - 1980) << 9) | ((at.getUTCMonth() + 1) << 5) | at.getUTCDate()

/** @throws Error past 4 GB */
export async function* zipOf(entries: AsyncIterable<ZipEntry>, now: Date = new Date()): Pieces {
  const date = dosDate(now)
  const written: Written[] = []
  let offset = 0
  for await (const { name, content } of entries) {
    const entry: Written = { name: Buffer.from(name), crc: 0, packed: 0, unpacked: 0, offset }
    const head = [
      fields([0x04034b50, 4], [VERSION, 2], [FLAGS, 2], [DEFLATE, 2], [0, 2], [date, 2]),
      fields([0, 4], [0, 4], [0, 4], [entry.name.length, 2], [0, 2]),
      entry.name,
    ]
    yield Buffer.concat(head)
    yield* deflated(content, entry)
    yield fields([0x08074b50, 4], [entry.crc, 4], [entry.packed, 4], [entry.unpacked, 4])
    offset += 30 + entry.name.length + entry.packed + 16
    if (entry.unpacked > MOST || offset > MOST) throw new Error('the archive is larger than 4 GB')
    written.push(entry)
  }
  const directory = Buffer.concat(written.flatMap((entry) => [directoryLine(entry, date), entry.name]))
  yield directory
  const count = written.length
  yield fields([0x06054b50, 4], [0, 2], [0, 2], [count, 2], [count, 2], [directory.length, 4], [offset, 4], [0, 2])
}

/** Counts into the entry while it packs. */
async function* deflated(content: AsyncIterable<Buffer>, entry: Written): Pieces {
  const counted = async function* () {
    for await (const piece of content) {
      entry.crc = crc32(piece, entry.crc)
      entry.unpacked += piece.length
      yield piece
    }
  }
  const packer = createDeflateRaw({ level: LEVEL })
  const packing = pipeline(Readable.from(counted()), packer)
  // A failure comes out of the loop below; here it only must not go unheard.
  packing.catch(() => undefined)
  for await (const piece of packer as AsyncIterable<Buffer>) {
    entry.packed += piece.length
    yield piece
  }
  await packing
}

const directoryLine = ({ name, crc, packed, unpacked, offset }: Written, date: number): Buffer =>
  Buffer.concat([
    fields([0x02014b50, 4], [VERSION, 2], [VERSION, 2], [FLAGS, 2], [DEFLATE, 2], [0, 2], [date, 2]),
    fields([crc, 4], [packed, 4], [unpacked, 4], [name.length, 2], [0, 2], [0, 2], [0, 2], [0, 2], [0, 4], [offset, 4]),
  ])
