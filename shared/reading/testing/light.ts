/** What light does to a synthetic picture. */
import type { Grey } from '../pixels/grey.ts'

/** Numbers from 0 to 1 that are the same for the same seed (a linear congruential generator, modulus 2^32). */
export function chanceFrom(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0
    return state / 2 ** 32
  }
}

/** Mirrored light over a part of the picture: every tone moves by `share` towards white. */
export function lightened(
  grey: Grey,
  share: number,
  part: { x: number; y: number; width: number; height: number } = { x: 0, y: 0, width: grey.width, height: grey.height },
): Grey {
  const data = Uint8Array.from(grey.data, (value, i) => {
    const x = i % grey.width
    const y = Math.floor(i / grey.width)
    const lit = x >= part.x && x < part.x + part.width && y >= part.y && y < part.y + part.height
    return lit ? Math.round(value + share * (250 - value)) : value
  })
  return { ...grey, data }
}

/** Little light, and the grain that comes with it: `grain` is its standard deviation in tones. */
export function dimmed(grey: Grey, gain: number, grain: number, chance: () => number): Grey {
  // The sum of three even chances is near enough to a bell; its standard deviation is a half.
  const bell = () => 2 * (chance() + chance() + chance() - 1.5)
  const data = Uint8Array.from(grey.data, (value) => Math.max(0, Math.min(255, Math.round(value * gain + grain * bell()))))
  return { ...grey, data }
}
