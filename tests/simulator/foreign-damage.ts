/** Picture files that were damaged on their way. */
import type { Chance } from './random.ts'

/** Bytes at the beginning that hold the tables of a JPEG of the simulator: what is damaged there is refused as a whole. */
const HEAD_BYTES = 700

/** Some bits of the picture's data turned over, the head left whole. */
export function turnBits(jpeg: Buffer, chance: Chance): Buffer {
  const out = Buffer.from(jpeg)
  const count = chance.pick([1, 3, 10, 40, 200])
  for (let i = 0; i < count; i += 1) out[chance.whole(HEAD_BYTES, out.length - 1)]! ^= 1 << chance.whole(0, 7)
  return out
}

/** A run of bytes in the middle that never arrived. */
export function loseMiddle(jpeg: Buffer, chance: Chance): Buffer {
  const from = chance.whole(HEAD_BYTES, Math.floor(0.8 * jpeg.length))
  return Buffer.concat([jpeg.subarray(0, from), jpeg.subarray(from + chance.whole(64, Math.floor(0.2 * jpeg.length)))])
}

/** A head that promises more pixels than any machine should unpack. */
export function claimHuge(jpeg: Buffer, chance: Chance): Buffer {
  const out = Buffer.from(jpeg)
  // The frame header: its marker, two bytes of length, one of precision, then height and width.
  const frame = out.indexOf(Buffer.from([0xff, 0xc0]))
  if (frame < 0) throw new Error('the picture is no baseline JPEG')
  out.writeUInt16BE(chance.whole(20_000, 65_000), frame + 5)
  out.writeUInt16BE(chance.whole(20_000, 65_000), frame + 7)
  return out
}
