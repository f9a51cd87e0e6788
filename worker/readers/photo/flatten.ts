/** The page as it would lie flat, for the desk: 150 dots an inch, so that crops are cut by the layout's millimetres alone. */
import { type PageMap, toPhoto } from '../../../shared/reading/geometry/page-map.ts'
import { sharpOnce } from './decode.ts'
import type { Raster } from './raster.ts'
import { whiten } from './whiten.ts'

export const FLAT_DPI = 150
export const FLAT_PX_PER_MM = FLAT_DPI / 25.4
/** The map is asked at every so many pixels, and followed straight in between. */
const GRID_PX = 8
const QUALITY = 78

/** `page`: millimetres of the layout. Gives a JPEG of 1240 x 1754 px for A4. */
export async function flattenPage(raster: Raster, map: PageMap, page: { width: number; height: number }): Promise<Buffer> {
  const width = Math.round(page.width * FLAT_PX_PER_MM)
  const height = Math.round(page.height * FLAT_PX_PER_MM)
  const channels = raster.channels === 1 ? 1 : 3
  const data = Buffer.alloc(width * height * channels, 255)
  const columns = Math.ceil(width / GRID_PX) + 1
  const rows = Math.ceil(height / GRID_PX) + 1
  const gridX = new Float32Array(columns * rows)
  const gridY = new Float32Array(columns * rows)
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const to = toPhoto(map, (column * GRID_PX) / FLAT_PX_PER_MM, (row * GRID_PX) / FLAT_PX_PER_MM)
      gridX[row * columns + column] = to.x
      gridY[row * columns + column] = to.y
    }
  }
  const along = (grid: Float32Array, at: number, fx: number, fy: number) => {
    const top = grid[at]! + (grid[at + 1]! - grid[at]!) * fx
    const bottom = grid[at + columns]! + (grid[at + columns + 1]! - grid[at + columns]!) * fx
    return top + (bottom - top) * fy
  }
  const from = raster.data
  const step = raster.channels
  const stride = raster.width * step
  for (let y = 0; y < height; y++) {
    const row = Math.floor(y / GRID_PX)
    const fy = (y - row * GRID_PX) / GRID_PX
    for (let x = 0; x < width; x++) {
      const column = Math.floor(x / GRID_PX)
      const at = row * columns + column
      const fx = (x - column * GRID_PX) / GRID_PX
      const px = along(gridX, at, fx, fy) - 0.5
      const py = along(gridY, at, fx, fy) - 0.5
      if (px < 0 || py < 0 || px >= raster.width - 1 || py >= raster.height - 1) continue
      const x0 = Math.floor(px)
      const y0 = Math.floor(py)
      const u = px - x0
      const v = py - y0
      const base = y0 * stride + x0 * step
      const into = (y * width + x) * channels
      for (let c = 0; c < channels; c++) {
        const i = base + c
        const top = from[i]! + (from[i + step]! - from[i]!) * u
        const bottom = from[i + stride]! + (from[i + stride + step]! - from[i + stride]!) * u
        data[into + c] = top + (bottom - top) * v + 0.5
      }
    }
  }
  whiten(data, channels)
  const sharp = await sharpOnce()
  return sharp(data, { raw: { width, height, channels } }).jpeg({ quality: QUALITY }).toBuffer()
}
