/**
 * The digit net on onnxruntime-node. One thread is the fastest here (more wait for each other on cells this small), and a
 * worker reads one page at a time.
 */
import { readFile } from 'node:fs/promises'
import { dirname, join } from 'node:path'
import { z } from 'zod'
import { CELL_HEIGHT_PX, CELL_PX, CELL_WIDTH_PX, CLASS_COUNT, type DigitNet } from '../../../shared/reading/classes.ts'

/** Cells a run: enough to keep the kernels busy, small enough to stay in the cache. */
const BATCH = 64

const cardSchema = z.object({ temperature: z.number().positive() })

/**
 * Loads digits.onnx and the temperature from card.json beside it.
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
  return {
    async classify(cells, count) {
      if (cells.length !== count * CELL_PX)
        throw new RangeError(`${count} cells need ${count * CELL_PX} values, not ${cells.length}.`)
      const out = new Float32Array(count * CLASS_COUNT)
      for (let start = 0; start < count; start += BATCH) {
        const n = Math.min(BATCH, count - start)
        const part = cells.subarray(start * CELL_PX, (start + n) * CELL_PX)
        const { logits } = await session.run({ cells: new Tensor('float32', part, [n, 1, CELL_HEIGHT_PX, CELL_WIDTH_PX]) })
        if (!logits || !(logits.data instanceof Float32Array)) throw new Error('The digit net gave no logits.')
        softmaxInto(logits.data, card.temperature, out, start * CLASS_COUNT)
      }
      return out
    },
  }
}

/** Softmax of each row of logits / temperature, written to `out` from `offset`. */
function softmaxInto(logits: Float32Array, temperature: number, out: Float32Array, offset: number): void {
  for (let row = 0; row < logits.length; row += CLASS_COUNT) {
    const values = logits.subarray(row, row + CLASS_COUNT)
    const top = Math.max(...values)
    let sum = 0
    for (let k = 0; k < CLASS_COUNT; k++) sum += out[offset + row + k] = Math.exp((values[k]! - top) / temperature)
    for (let k = 0; k < CLASS_COUNT; k++) out[offset + row + k]! /= sum
  }
}
