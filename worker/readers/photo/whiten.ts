/** The light's colour taken off a flattened page: paper looks like paper at the desk, whatever the sky or the lamp was. */

/** Paper fills most of a sheet, so the level that a fifth of the dots reach or pass is paper in every channel. */
const PAPER_SHARE = 0.2
const PAPER_LEVEL = 236
/** Stronger lifting would only blow up the grain of a page photographed in the dark. */
const MOST_LIFT = 2.4
const EVERY = 7

/** Scales each channel in place so that paper comes out alike in all of them. `data`: interleaved, 8 bits. */
export function whiten(data: Uint8Array, channels: number): void {
  for (let channel = 0; channel < channels; channel++) {
    const lift = Math.min(MOST_LIFT, PAPER_LEVEL / Math.max(1, paperLevel(data, channels, channel)))
    const table = Uint8Array.from({ length: 256 }, (_, level) => Math.min(255, Math.round(level * lift)))
    for (let i = channel; i < data.length; i += channels) data[i] = table[data[i]!]!
  }
}

function paperLevel(data: Uint8Array, channels: number, channel: number): number {
  const counts = new Uint32Array(256)
  let dots = 0
  for (let i = channel; i < data.length; i += channels * EVERY) {
    counts[data[i]!]!++
    dots++
  }
  let above = 0
  for (let level = 255; level > 0; level--) {
    above += counts[level]!
    if (above >= dots * PAPER_SHARE) return level
  }
  return 0
}
