/** The barcode program is handed in: reading asks it for QR codes in a grey picture and nothing else. */
import type { Grey, Point } from '../pixels/grey.ts'

export interface FoundCode {
  text: string
  /** Corners of the symbol in pixels: its own top left, top right, bottom right, bottom left. */
  corners: readonly [Point, Point, Point, Point]
}

export type CodeFinder = (grey: Grey) => Promise<FoundCode[]>
