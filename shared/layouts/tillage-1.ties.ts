/** What the sums of the tillage sheet, version 1, tie together. */
import type { Tie } from './tie.ts'

export const tillageTies: ReadonlyArray<Tie> = []
