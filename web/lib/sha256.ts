/** SHA-256 (FIPS 180-4). The browser's own where it has one; phones on plain http in a local network have none. */

/** Fractional parts of the cube roots of the first 64 primes, and of the square roots of the first 8 (FIPS 180-4, 4.2.2 and 5.3.3). */
const PRIMES = [
  2, 3, 5, 7, 11, 13, 17, 19, 23, 29, 31, 37, 41, 43, 47, 53, 59, 61, 67, 71, 73, 79, 83, 89, 97, 101, 103, 107, 109, 113, 127,
  131, 137, 139, 149, 151, 157, 163, 167, 173, 179, 181, 191, 193, 197, 199, 211, 223, 227, 229, 233, 239, 241, 251, 257, 263,
  269, 271, 277, 281, 283, 293, 307, 311,
] as const
const fraction = (root: number) => ((root - Math.floor(root)) * 2 ** 32) | 0
const K = Int32Array.from(PRIMES, (p) => fraction(Math.cbrt(p)))
const START = PRIMES.slice(0, 8).map((p) => fraction(Math.sqrt(p)))

const hex = (bytes: Uint8Array) => Array.from(bytes, (b) => b.toString(16).padStart(2, '0')).join('')

/** Hexadecimal digest of the bytes. */
export async function sha256(bytes: ArrayBuffer): Promise<string> {
  if (globalThis.crypto?.subtle) return hex(new Uint8Array(await crypto.subtle.digest('SHA-256', bytes)))
  return sha256Plain(new Uint8Array(bytes))
}

/** The same in plain arithmetic, without the browser's help. */
export function sha256Plain(message: Uint8Array): string {
  const padded = new Uint8Array((((message.length + 8) >> 6) + 1) << 6)
  padded.set(message)
  padded[message.length] = 0x80
  const view = new DataView(padded.buffer)
  view.setUint32(padded.length - 8, Math.floor(message.length / 2 ** 29))
  view.setUint32(padded.length - 4, message.length << 3)
  const state = Int32Array.from(START)
  const words = new Int32Array(64)
  for (let at = 0; at < padded.length; at += 64) block(state, words, view, at)
  const out = new DataView(new ArrayBuffer(32))
  state.forEach((word, i) => {
    out.setInt32(i * 4, word)
  })
  return hex(new Uint8Array(out.buffer))
}

const turn = (x: number, n: number) => (x >>> n) | (x << (32 - n))

function block(state: Int32Array, w: Int32Array, view: DataView, at: number): void {
  for (let i = 0; i < 16; i += 1) w[i] = view.getInt32(at + i * 4)
  for (let i = 16; i < 64; i += 1) {
    const [a, b] = [w[i - 15]!, w[i - 2]!]
    const s0 = turn(a, 7) ^ turn(a, 18) ^ (a >>> 3)
    const s1 = turn(b, 17) ^ turn(b, 19) ^ (b >>> 10)
    w[i] = (w[i - 16]! + s0 + w[i - 7]! + s1) | 0
  }
  let [a, b, c, d, e, f, g, h] = state as unknown as [number, number, number, number, number, number, number, number]
  for (let i = 0; i < 64; i += 1) {
    const t1 = (h + (turn(e, 6) ^ turn(e, 11) ^ turn(e, 25)) + ((e & f) ^ (~e & g)) + K[i]! + w[i]!) | 0
    const t2 = ((turn(a, 2) ^ turn(a, 13) ^ turn(a, 22)) + ((a & b) ^ (a & c) ^ (b & c))) | 0
    ;[h, g, f, e, d, c, b, a] = [g, f, e, (d + t1) | 0, c, b, a, (t1 + t2) | 0]
  }
  ;[a, b, c, d, e, f, g, h].forEach((word, i) => {
    state[i] = (state[i]! + word) | 0
  })
}
