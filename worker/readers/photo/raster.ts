/** A decoded picture, in colour where the desk wants to see it, and its grey for reading. */
import type { Grey } from '../../../shared/reading/pixels/grey.ts'

export interface Raster {
  width: number
  height: number
  /** 1 grey, 3 red green blue, 4 with an unused fourth. */
  channels: 1 | 3 | 4
  data: Uint8Array
}

/** Grey as `decodeImage` takes it: green. A grey raster is taken as it is, without a copy. */
export function greyOf({ width, height, channels, data }: Raster): Grey {
  if (channels === 1) return { width, height, data }
  const grey = new Uint8Array(width * height)
  for (let i = 0, at = 1; i < grey.length; i++, at += channels) grey[i] = data[at]!
  return { width, height, data: grey }
}
