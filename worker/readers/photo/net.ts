/**
 * The digit net on onnxruntime-node. One thread is the fastest here (more wait for each other on cells this small), and a
 * worker reads one page at a time.
 */
import { readFile } from 'node:fs/promises'
import { dirname, join } from 'node:path'
import { z } from 'zod'
import { inkFree } from '../../../shared/reading/cells/ink-free.ts'
import { BLANK, CELL_HEIGHT_PX, CELL_PX, CELL_WIDTH_PX, CLASS_COUNT, type DigitNet } from '../../../shared/reading/classes.ts'

/** Cells a run: enough to keep the kernels busy, small enough to stay in the cache. */
const BATCH = 64

const cardSchema = z.object({
  temperature: z.number().positive(),
  /** Cells whose best class is below this are looked at again, cut a pixel off to each side. */
  secondLook: z.object({ below: z.number(), temperature: z.number().positive() }),
})

/** What is left to the other classes where a cell plainly holds no ink: as the net itself gives there. */
const DOUBT_OF_BLANK = 0.0005

/** A pixel right, left, down and up, as in training's figures. */
const SHIFTS = [
  [1, 0],
  [-1, 0],
  [0, 1],
  [0, -1],
] as const

/**
 * Loads digits.onnx and the temperatures from card.json beside it.
 * @throws when either file is missing or is not what it should be; without its net the worker must not start.
 */
export async function createNet(modelPath: string): Promise<DigitNet> {
  const card = cardSchema.parse(JSON.parse(await readFile(join(dirname(modelPath), 'card.json'), 'utf8')))
  const { InferenceSession, Tensor } = await import('onnxruntime-node')
  const session = await InferenceSession.create(modelPath, {
    intraOpNumThreads: 1,
    interOpNumThreads: 1,
    executionMode: 'sequential',
    graphOptimizationLevel: 'all',
  })

  async function logitsOf(cells: Float32Array, count: number): Promise<Float32Array> {
    const out = new Float32Array(count * CLASS_COUNT)
    for (let start = 0; start < count; start += BATCH) {
      const n = Math.min(BATCH, count - start)
      const part = cells.subarray(start * CELL_PX, (start + n) * CELL_PX)
      const { logits } = await session.run({ cells: new Tensor('float32', part, [n, 1, CELL_HEIGHT_PX, CELL_WIDTH_PX]) })
      if (!(logits?.data instanceof Float32Array)) throw new Error('The digit net gave no logits.')
      out.set(logits.data, start * CLASS_COUNT)
    }
    return out
  }

  return {
    async classify(cells, count) {
      if (cells.length !== count * CELL_PX)
        throw new RangeError(`${count} cells need ${count * CELL_PX} values, not ${cells.length}.`)
      const out = new Float32Array(count * CLASS_COUNT).fill(DOUBT_OF_BLANK / (CLASS_COUNT - 1))
      const inked: number[] = []
      for (let cell = 0; cell < count; cell++) {
        if (inkFree(cells, cell)) out[cell * CLASS_COUNT + BLANK] = 1 - DOUBT_OF_BLANK
        else inked.push(cell)
      }
      const logits = await logitsOf(cutOff(cells, inked, [[0, 0]]), inked.length)
      const unsure = inked
        .map((cell, row) => ({ cell, row }))
        .filter(({ cell, row }) => softmaxInto(logits, row, card.temperature, out, cell) < card.secondLook.below)
      const shifted = cutOff(
        cells,
        unsure.map(({ cell }) => cell),
        SHIFTS,
      )
      const again = await logitsOf(shifted, unsure.length * SHIFTS.length)
      unsure.forEach(({ cell, row }, i) => {
        for (let k = 0; k < CLASS_COUNT; k++) {
          let sum = logits[row * CLASS_COUNT + k]!
          for (let s = 0; s < SHIFTS.length; s++) sum += again[(i * SHIFTS.length + s) * CLASS_COUNT + k]!
          logits[row * CLASS_COUNT + k] = sum / (SHIFTS.length + 1)
        }
        softmaxInto(logits, row, card.secondLook.temperature, out, cell)
      })
      return out
    },
  }
}

/** The cells named, each cut off by every shift, their edge repeated. */
function cutOff(cells: Float32Array, named: readonly number[], shifts: ReadonlyArray<readonly [number, number]>): Float32Array {
  const out = new Float32Array(named.length * shifts.length * CELL_PX)
  let at = 0
  for (const cell of named) {
    for (const [right, down] of shifts) {
      for (let y = 0; y < CELL_HEIGHT_PX; y++) {
        const row = cell * CELL_PX + within(y + down, CELL_HEIGHT_PX) * CELL_WIDTH_PX
        for (let x = 0; x < CELL_WIDTH_PX; x++) out[at++] = cells[row + within(x + right, CELL_WIDTH_PX)]!
      }
    }
  }
  return out
}

const within = (place: number, size: number) => Math.min(size - 1, Math.max(0, place))

/** Softmax of one row of logits / temperature into a cell's place of `out`; gives the highest probability. */
function softmaxInto(logits: Float32Array, row: number, temperature: number, out: Float32Array, cell: number): number {
  const values = logits.subarray(row * CLASS_COUNT, (row + 1) * CLASS_COUNT)
  const into = cell * CLASS_COUNT
  const top = Math.max(...values)
  let sum = 0
  for (let k = 0; k < CLASS_COUNT; k++) sum += out[into + k] = Math.exp((values[k]! - top) / temperature)
  for (let k = 0; k < CLASS_COUNT; k++) out[into + k]! /= sum
  return 1 / sum
}
