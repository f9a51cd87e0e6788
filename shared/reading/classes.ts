/**
 * What the digit net takes and gives, so that reading can have it handed in (onnxruntime in the worker, anything else in a
 * browser).
 *
 * Input: Float32Array of count * 40 * 32 values, cell after cell, row by row: a crop 6.4 mm wide and 8 mm high at 5 pixels a
 * millimetre, centred on the printed box (about 5.6 x 7.1 mm), so that the frame and some 0.4 mm around it are in the crop.
 * A value is (paper - grey) / (paper - black), held within 0..1: 0 is the paper beside the cell, 1 the level of solid printed
 * black nearby. The net has seen paper off by 0.05 and black off by a fifth; a pen or pencil lighter than print is left so.
 */
export const CELL_WIDTH_PX = 32
export const CELL_HEIGHT_PX = 40
export const CELL_PX_PER_MM = 5
export const CELL_PX = CELL_WIDTH_PX * CELL_HEIGHT_PX

/** Classes 0 to 9 are the digits. */
export const BLANK = 10
/** Crossed out, two digits in one box, one written over another, scribble, spilled over. */
export const VOID = 11
export const CLASS_COUNT = 12

/** Probabilities of the twelve classes for one box, adding up to 1. */
export type BoxDist = ArrayLike<number>

export interface DigitNet {
  /** Probabilities, count * 12, calibrated (temperature applied). Throws RangeError where the array does not hold `count` cells. */
  classify(cells: Float32Array, count: number): Promise<Float32Array>
}

/** Probabilities for one tick box, adding up to 1; `spoiled` is a tick crossed out again, or ink that is neither. */
export interface TickDist {
  ticked: number
  empty: number
  spoiled: number
}

/** The distribution of one box out of what `classify` gave. */
export const boxDist = (probabilities: Float32Array, index: number): Float32Array =>
  probabilities.subarray(index * CLASS_COUNT, (index + 1) * CLASS_COUNT)
