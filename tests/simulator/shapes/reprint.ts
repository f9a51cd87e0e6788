/** The print on another sheet of paper, larger or smaller than it should be, and by a tired cartridge. */
import { roughNoise } from '../noise.ts'
import type { Paper } from '../paper.ts'
import type { Chance } from '../random.ts'
import type { Condition } from './condition.ts'

export interface Reprint {
  paper: Paper
  /** Where the print's upper left corner lies on it, in mm of the print. */
  left: number
  top: number
}

function move(source: Uint8Array, from: Paper, to: { width: number; height: number }, dx: number, dy: number, bare: number) {
  const out = new Uint8Array(to.width * to.height).fill(bare)
  const [left, right] = [Math.max(0, dx), Math.min(to.width, from.width + dx)]
  for (let y = Math.max(0, dy); y < Math.min(to.height, from.height + dy); y += 1) {
    const start = (y - dy) * from.width - dx
    out.set(source.subarray(start + left, start + right), y * to.width + left)
  }
  return out
}

/** The sheet of paper in mm of the print. */
export const paperPage = (layoutPage: { width: number; height: number }, print: Condition['print']) =>
  print ? { width: print.width / print.scale, height: print.height / print.scale } : layoutPage

/** Sets the print in the middle of another sheet, as "fit to page" does; what does not fit on it is lost. */
export function reprint(paper: Paper, layoutPage: { width: number; height: number }, print: Condition['print']): Reprint {
  if (!print) return { paper, left: 0, top: 0 }
  const page = paperPage(layoutPage, print)
  const [left, top] = [(page.width - layoutPage.width) / 2, (page.height - layoutPage.height) / 2]
  const to = { width: Math.round(page.width * paper.dotsPerMm), height: Math.round(page.height * paper.dotsPerMm) }
  const [dx, dy] = [Math.round(left * paper.dotsPerMm), Math.round(top * paper.dotsPerMm)]
  const moved = {
    ...paper,
    ...to,
    print: move(paper.print, paper, to, dx, dy, 255),
    cover: move(paper.cover, paper, to, dx, dy, 0),
  }
  return { paper: moved, left: dx / paper.dotsPerMm, top: dy / paper.dotsPerMm }
}

/** Pale streaks along the page, and blotches: `lack` is the share of toner that is missing at most, in place. */
export function streak(paper: Paper, lack: number, chance: Chance): void {
  const offset = chance.between(0, 200)
  const { width, height, print, dotsPerMm } = paper
  const across = Float32Array.from({ length: width }, (_, x) => roughNoise(x / dotsPerMm / 6 + offset, offset, 3))
  for (let y = 0; y < height; y += 1) {
    const along = roughNoise(offset, y / dotsPerMm / 30, 2)
    for (let x = 0; x < width; x += 1) {
      const missing = lack * Math.min(1, Math.max(0, (across[x]! + 0.4 * along - 0.5) * 2.5))
      const i = y * width + x
      print[i] = 255 - (255 - print[i]!) * (1 - missing)
    }
  }
}
